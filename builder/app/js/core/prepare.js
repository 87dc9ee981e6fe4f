/** Typed arrays and look-ups made once per pack. */
import { NATS_PER_CENTIBAN } from './rounding.js';

/** @type {WeakMap<object, Key>} */
const prepared = new WeakMap();

/**
 * @typedef {object} Key
 * @property {object} pack
 * @property {number} Z zones
 * @property {number} P plants
 * @property {Int16Array} found [plant][5][zone] centibans
 * @property {Int16Array} absent [plant][4][zone] centibans
 * @property {Int16Array} implied [plant][3][zone] centibans
 * @property {Float64Array} presence [plant][zone] chance of a report, 0..1
 * @property {Float64Array} cover [plant][4][zone] shares of the cover steps
 * @property {Float64Array} lowered [plant][4][zone] cover shares of a plant in patches
 */

/** Prepare a pack, or hand back what was prepared before. @returns {Key} */
export function prepare(pack) {
  let key = prepared.get(pack);
  if (!key) {
    key = build(pack);
    prepared.set(pack, key);
  }
  return key;
}

function build(pack) {
  const Z = pack.zones.length;
  const P = pack.plants.length;
  const { evidence } = pack;
  const presence = Float64Array.from(evidence.expected.flat(), (share) => share / 10000);
  const found = Int16Array.from(evidence.found.flat(2));
  const cover = coverShares(pack, found, P, Z);
  return {
    pack,
    Z,
    P,
    settings: pack.settings,
    found,
    absent: Int16Array.from(evidence.absent.flat(2)),
    implied: Int16Array.from(evidence.implied.flat(2)),
    presence,
    cover,
    lowered: loweredCover(cover, P, Z, pack.settings.mosaic_lower),
    plantAt: indexById(pack.plants),
    zoneAt: indexById(pack.zones),
    groupAt: indexById(pack.groups),
    questionAt: indexById(pack.questions),
    classAt: new Map(pack.cover.classes.map((one, at) => [one.code, at])),
    newcomer: newcomerRows(evidence.newcomer),
    pairs: zonePairs(pack.zones),
    neutral: new Int32Array(Z),
    effects: new Map(),
    chances: new Map(),
  };
}

const indexById = (list) => new Map(list.map((one, at) => [one.id, at]));

/** Shares of the cover steps where a plant is reported, from its evidence and overall shares. */
function coverShares(pack, found, P, Z) {
  const nats = NATS_PER_CENTIBAN / pack.settings.temper;
  const cover = new Float64Array(P * 4 * Z);
  for (let p = 0; p < P; p += 1) {
    const overall = pack.evidence.found_share[p];
    for (let z = 0; z < Z; z += 1) {
      let sum = 0;
      const any = found[(p * 5 + 4) * Z + z];
      for (let s = 0; s < 4; s += 1) {
        const share = overall[s] * Math.exp((found[(p * 5 + s) * Z + z] - any) * nats);
        cover[(p * 4 + s) * Z + z] = share;
        sum += share;
      }
      for (let s = 0; s < 4; s += 1) cover[(p * 4 + s) * Z + z] /= sum;
    }
  }
  return cover;
}

/** In patches a plant may look one step less plentiful. */
function loweredCover(cover, P, Z, share) {
  const lowered = new Float64Array(cover.length);
  for (let p = 0; p < P; p += 1) {
    for (let s = 0; s < 4; s += 1) {
      for (let z = 0; z < Z; z += 1) {
        const at = (p * 4 + s) * Z + z;
        const above = s < 3 ? cover[at + Z] : 0;
        const kept = s === 0 ? cover[at] : (1 - share) * cover[at];
        lowered[at] = kept + share * above;
      }
    }
  }
  return lowered;
}

/** Row of the newcomer tables by plant, level and whether the plant is only half visible. */
function newcomerRows(newcomer) {
  const at = new Map();
  newcomer.rows.forEach(([plant, level, half], row) => at.set(`${plant}/${level}/${half}`, row));
  return { at, found: newcomer.found, absent: newcomer.absent };
}

function zonePairs(zones) {
  const pairs = [];
  for (let i = 0; i < zones.length; i += 1) {
    for (let j = i + 1; j < zones.length; j += 1) {
      const edge = zones[i].neighbours.includes(j) || zones[j].neighbours.includes(i);
      pairs.push({ i, j, edge });
    }
  }
  return pairs;
}

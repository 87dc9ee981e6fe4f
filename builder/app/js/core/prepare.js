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
  const { found, absent, implied, presence } = plantTables(evidence.plants, P, Z);
  const cover = coverShares(pack, found, P, Z);
  return {
    pack,
    Z,
    P,
    settings: pack.settings,
    found,
    absent,
    implied,
    presence,
    cover,
    lowered: loweredCover(cover, P, Z, pack.settings.mosaic_lower),
    plantAt: indexById(pack.plants),
    zoneAt: indexById(pack.zones),
    groupAt: indexById(pack.groups),
    questionAt: indexById(pack.questions),
    classAt: new Map(pack.cover.classes.map((one, at) => [one.code, at])),
    newcomer: newcomerRows(evidence.newcomer, Z),
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

/** Newcomers by plant, level and half; points per v, then zone, each v less the one before. */
function newcomerRows({ rows, tables }, Z) {
  const at = new Map();
  rows.forEach(([plant, level, half], row) => at.set(`${plant}/${level}/${half}`, row));
  const found = [];
  const absent = [];
  tables.forEach((short) => {
    const steps = short[0].length / 2;
    const read = (from) => {
      const points = Array.from({ length: steps }, (none, v) => rowOf(short, from + v, Z));
      for (let v = 1; v < steps; v += 1) {
        for (let z = 0; z < Z; z += 1) points[v][z] += points[v - 1][z];
      }
      return points;
    };
    found.push(read(0));
    absent.push(read(steps));
  });
  return { at, found, absent };
}

/** One row of a table in short: [rest, zones, here] (builder/key/sparse.py). */
function rowOf([rest, zones, here], row, Z) {
  const points = new Int32Array(Z).fill(rest[row]);
  zones.forEach((z, at) => { points[z] = here[at][row]; });
  return points;
}

/** Rows 0..3 found by cover step less row 4, 4 found, 5..8 absent, 9..11 implied, 12 expected. */
function plantTables(tables, P, Z) {
  const found = new Int16Array(P * 5 * Z);
  const absent = new Int16Array(P * 4 * Z);
  const implied = new Int16Array(P * 3 * Z);
  const presence = new Float64Array(P * Z);
  tables.forEach((short, p) => {
    const rows = short[0].map((rest, row) => rowOf(short, row, Z));
    for (let z = 0; z < Z; z += 1) {
      for (let s = 0; s < 5; s += 1) {
        found[(p * 5 + s) * Z + z] = rows[s][z] + (s < 4 ? rows[4][z] : 0);
      }
      for (let v = 0; v < 4; v += 1) absent[(p * 4 + v) * Z + z] = rows[5 + v][z];
      for (let k = 0; k < 3; k += 1) implied[(p * 3 + k) * Z + z] = rows[9 + k][z];
      presence[p * Z + z] = rows[12][z] / 10000;
    }
  });
  return { found, absent, implied, presence };
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

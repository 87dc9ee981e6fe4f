/**
 * Makes of anything that came in a file a record that screens and key may trust, or refuses it.
 * Pure. Every field is taken by name and type; what is not known is left out, what has another type
 * becomes the empty value and is counted.
 */

const LONGEST_TEXT = 20_000;
const MOST_ROWS = 2_000;
const DEEPEST = 8;
const MOST_PARTS = 20_000;
const ID = /^[\w-]{1,64}$/;
const WORD = /^[a-z][a-z0-9_]{0,63}$/;
const DAY = /^\d{4}-\d{2}-\d{2}$/;
const MOMENT = /^\d{4}-\d{2}-\d{2}T\d{2}:\d{2}:\d{2}(\.\d+)?(Z|[+-]\d{2}:\d{2})$/;
// Control characters and marks that turn the direction of text can hide what a line says.
const UNSEEN = /[\u0000-\u0008\u000b\u000c\u000e-\u001f\u007f\u202a-\u202e\u2066-\u2069]/g;
// Half a character can neither be sent nor stored elsewhere.
const LONE = /\p{Surrogate}/gu;
const ROLES = ['edge', 'inside', 'reference', 'duplicate'];
const STATES = ['found', 'not_found', 'cant_tell'];
const FORMAT = 1;

/**
 * @param {unknown} raw
 * @returns {{site: object, changed: string[]}|{refused: 'not_a_record'|'newer'|'incomplete'}}
 *   changed: names of fields whose content had the wrong type
 */
export function cleanSite(raw) {
  if (!isObject(raw)) return { refused: 'not_a_record' };
  if (Number.isInteger(raw.format) && raw.format > FORMAT) return { refused: 'newer' };
  const essential = ID.test(raw.id) && typeof raw.id === 'string' && Number.isInteger(raw.revision) && raw.revision >= 1
    && raw.revision < 1e9 && isText(raw.region_id) && WORD.test(raw.region_id) && isText(raw.edition)
    && isText(raw.pack_hash) && ID.test(raw.pack_hash) && isText(raw.date) && DAY.test(raw.date);
  if (!essential) return { refused: 'incomplete' };
  const take = taker(raw);
  const month = Number(raw.date.slice(5, 7));
  if (month < 1 || month > 12) return { refused: 'incomplete' };
  const site = {
    format: FORMAT,
    id: raw.id,
    revision: raw.revision,
    region_id: raw.region_id,
    edition: text(raw.edition, 40),
    pack_hash: raw.pack_hash,
    unit_id: take('unit_id', (v) => v === null || (isText(v) && ID.test(v)), null),
    unit_name: text(take('unit_name', isText, ''), 200),
    role: take('role', (v) => ROLES.includes(v), 'inside'),
    name: text(take('name', isText, ''), 200),
    observer: text(take('observer', isText, ''), 200),
    created_at: take('created_at', isMoment, `${raw.date}T00:00:00Z`),
    changed_at: take('changed_at', isMoment, `${raw.date}T00:00:00Z`),
    date: raw.date,
    month: take('month', (v) => Number.isInteger(v) && v >= 1 && v <= 12, month),
    place: placeOf(take('place', isObject, {})),
    disturbance: take('disturbance', (v) => v === null || (isText(v) && WORD.test(v)), null),
    questions: answersOf(take('questions', isObject, {})),
    findings: take('findings', Array.isArray, []).slice(0, MOST_ROWS).map(findingOf).filter(Boolean),
    whole_plot_searched: take('whole_plot_searched', isFlag, false),
    digging: diggingOf(take('digging', isObject, {})),
    struck: take('struck', Array.isArray, []).filter((v) => isText(v) && WORD.test(v)).slice(0, MOST_ROWS),
    call: plain(take('call', isObjectOrNull, null)),
    overruled: plain(take('overruled', isObjectOrNull, null)),
    notes: text(take('notes', isText, ''), LONGEST_TEXT),
    photos: take('photos', Array.isArray, []).filter((v) => isText(v) && ID.test(v)).slice(0, MOST_ROWS),
    production: plain(take('production', isObject, {})) ?? {},
    reclaim: plain(take('reclaim', isObject, {})) ?? {},
  };
  for (const more of ['stand', 'patches', 'spots']) {
    if (more in raw) site[more] = plain(raw[more]);
  }
  const edits = editsOf(raw.edits, raw.revision);
  if (edits) site.edits = edits;
  return { site, changed: take.changed };
}

/** @returns {{unit: object}|{refused: string}} */
export function cleanUnit(raw) {
  if (!isObject(raw)) return { refused: 'not_a_record' };
  if (Number.isInteger(raw.format) && raw.format > FORMAT) return { refused: 'newer' };
  if (!isText(raw.id) || !ID.test(raw.id) || !isText(raw.name)) return { refused: 'incomplete' };
  const rest = plain(raw) ?? {};
  return { unit: { ...rest, format: FORMAT, id: raw.id, name: text(raw.name, 200) } };
}

/**
 * What is said about a photo that came in a file; its bytes are read apart.
 *
 * @returns {{photo: object}|{refused: string}}
 */
export function cleanPhoto(raw) {
  const whole = isObject(raw) && isText(raw.id) && ID.test(raw.id) && isText(raw.site_id) && ID.test(raw.site_id)
    && ['image/jpeg', 'image/png', 'image/webp'].includes(raw.type) && isText(raw.bytes_base64);
  if (!whole) return { refused: 'incomplete' };
  return {
    photo: {
      id: raw.id,
      site_id: raw.site_id,
      type: raw.type,
      caption: isText(raw.caption) ? text(raw.caption, 1_000) : '',
      taken_at: isMoment(raw.taken_at) ? raw.taken_at : '1970-01-01T00:00:00Z',
    },
  };
}

function taker(raw) {
  const changed = [];
  const take = (name, fits, empty) => {
    if (!(name in raw)) return empty;
    if (fits(raw[name])) return raw[name];
    changed.push(name);
    return empty;
  };
  take.changed = changed;
  return take;
}

function placeOf(raw) {
  const within = (low, high) => (v) => (Number.isFinite(v) && v >= low && v <= high ? v : null);
  return {
    latitude_deg: within(-90, 90)(raw.latitude_deg),
    longitude_deg: within(-180, 180)(raw.longitude_deg),
    accuracy_m: within(0, 1e6)(raw.accuracy_m),
    height_m: within(-500, 9000)(raw.height_m),
    slope_pct: within(0, 1000)(raw.slope_pct),
    aspect_deg: within(0, 360)(raw.aspect_deg),
  };
}

function answersOf(raw) {
  const pairs = Object.entries(raw).filter(([id, value]) => WORD.test(id) && isText(value) && WORD.test(value));
  return Object.fromEntries(pairs.slice(0, MOST_ROWS));
}

function findingOf(raw) {
  if (!isObject(raw) || !STATES.includes(raw.state)) return null;
  const subject = ['plant_id', 'group_id'].find((key) => isText(raw[key]) && WORD.test(raw[key]));
  if (!subject) return null;
  const cover = isText(raw.cover) && /^[\w.+-]{1,12}$/.test(raw.cover) ? raw.cover : null;
  const named = [1, 2, 3].includes(raw.named) ? raw.named : null;
  return { [subject]: raw[subject], state: raw.state, cover, named };
}

function diggingOf(raw) {
  return {
    cleared: ['lines', 'hand'].includes(raw.cleared) ? raw.cleared : null,
    by: isText(raw.by) ? text(raw.by, 200) : '',
    number: isText(raw.number) ? text(raw.number, 200) : '',
    date: isText(raw.date) && DAY.test(raw.date) ? raw.date : null,
  };
}

/** Counts of changes by device; left out where they cannot be true. */
function editsOf(raw, revision) {
  if (!isObject(raw)) return null;
  const pairs = Object.entries(raw).filter(([id, n]) => ID.test(id) && Number.isInteger(n) && n > 0 && n <= revision);
  return pairs.length > 0 && pairs.length <= 200 ? Object.fromEntries(pairs) : null;
}

/** Bare data without hidden characters, null where it is too deep or too much. */
function plain(value) {
  let parts = 0;
  const copy = (part, depth) => {
    parts += 1;
    if (depth > DEEPEST || parts > MOST_PARTS) throw new RangeError('too deep or too much');
    if (typeof part === 'string') return text(part, LONGEST_TEXT);
    if (part === null || typeof part === 'boolean' || Number.isFinite(part)) return part;
    if (Array.isArray(part)) return part.map((one) => copy(one, depth + 1));
    if (!isObject(part)) return null;
    const pairs = Object.entries(part).filter(([key]) => /^[\w .-]{1,64}$/.test(key) && key !== '__proto__');
    return Object.fromEntries(pairs.map(([key, one]) => [key, copy(one, depth + 1)]));
  };
  try {
    return copy(value, 0);
  } catch {
    return null;
  }
}

const isObject = (v) => typeof v === 'object' && v !== null && !Array.isArray(v);
const isObjectOrNull = (v) => v === null || isObject(v);
const isText = (v) => typeof v === 'string';
const isFlag = (v) => typeof v === 'boolean';
const isMoment = (v) => isText(v) && MOMENT.test(v);
const text = (v, longest) => v.replace(UNSEEN, '').slice(0, longest).replace(LONE, '');

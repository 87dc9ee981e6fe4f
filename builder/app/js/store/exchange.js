/**
 * Records out to one JSON file and in from one. Out loses nothing; in takes nothing on trust.
 *
 *   {"format": 1, "kind": "beltbook records", "made_at": …, "units": […], "sites": […], "photos": […]}
 */
import { cleanPhoto, cleanSite, cleanUnit } from './clean.js';
import { Fault } from './faults.js';
import { PHOTOS, UNITS } from './names.js';
import { photosOf } from './photos.js';
import { loadSite, mergeSites } from './sites.js';
import { stamp } from './time.js';
import { inStore } from './tx.js';
import { listUnits } from './units.js';

const KIND = 'beltbook records';
const FORMAT = 1;
/** A phone shows nothing for a minute while it reads more than this. */
export const LARGEST_BYTES = 50_000_000;

/**
 * The records as the text of one file.
 *
 * @param {import('./schema.js').Store} store
 * @param {string[]} ids  of site checks
 * @param {{photos?: boolean, names?: boolean}} [also]  photos: with them; names: observers in full,
 *   else as initials
 */
export async function exportRecords(store, ids, also = {}) {
  const sites = (await Promise.all(ids.map((id) => loadSite(store, id)))).filter(Boolean);
  const units = await listUnits(store);
  const photos = also.photos ? (await Promise.all(ids.map((id) => photosOf(store, id)))).flat() : [];
  return JSON.stringify({
    format: FORMAT,
    kind: KIND,
    made_at: stamp(),
    units: units.filter((unit) => sites.some((site) => site.unit_id === unit.id)),
    sites: sites.map((site) => (also.names ? site : { ...site, observer: initialsOf(site.observer) })),
    photos: photos.map(({ bytes, ...said }) => ({ ...said, bytes_base64: base64Of(bytes) })),
  });
}

/** "Ana María Ruiz" → "A. M. R." @param {string} name */
export function initialsOf(name) {
  return name.split(/\s+/).filter(Boolean).map((part) => (part.endsWith('.') ? part : `${[...part][0].toUpperCase()}.`)).join(' ');
}

/**
 * Reads a file that somebody handed over.
 *
 * @param {string} text
 * @returns {{sites: object[], units: object[], photos: object[], changed: {id: string, fields: string[]}[],
 *            refused: {what: 'site'|'unit'|'photo', at: number, why: string}[]}}
 * @throws {Fault} 'too_large', 'not_ours' or 'newer'
 */
export function readRecords(text) {
  if (text.length > LARGEST_BYTES) throw new Fault('too_large');
  const file = parsed(text);
  if (typeof file !== 'object' || file === null || file.kind !== KIND) throw new Fault('not_ours');
  if (Number.isInteger(file.format) && file.format > FORMAT) throw new Fault('newer');
  const result = { sites: [], units: [], photos: [], changed: [], refused: [] };
  const each = (list, what, clean, keep) => (Array.isArray(list) ? list : []).forEach((raw, at) => {
    const found = clean(raw);
    if (found.refused) result.refused.push({ what, at, why: found.refused });
    else keep(found, raw, at);
  });
  each(file.sites, 'site', cleanSite, ({ site, changed }) => {
    result.sites.push(site);
    if (changed.length > 0) result.changed.push({ id: site.id, fields: changed });
  });
  each(file.units, 'unit', cleanUnit, ({ unit }) => result.units.push(unit));
  each(file.photos, 'photo', cleanPhoto, ({ photo }, raw, at) => {
    const bytes = bytesOf(raw.bytes_base64);
    if (bytes && isPicture(bytes, photo.type)) result.photos.push({ ...photo, bytes });
    else result.refused.push({ what: 'photo', at, why: 'not_a_picture' });
  });
  return result;
}

/**
 * Takes what was read into the store: site checks by id and revision, units and photos where this
 * phone has none of that id.
 *
 * @returns {Promise<object>} as mergeSites, and `photos`: how many were added
 */
export async function takeIn(store, { sites, units, photos }) {
  const merged = await mergeSites(store, sites);
  const added = await inStore(store.records, [UNITS, PHOTOS], 'readwrite', (unitRows, photoRows) => {
    const outcome = { result: 0 };
    for (const unit of units) ifAbsent(unitRows, unit, () => {});
    for (const photo of photos) ifAbsent(photoRows, photo, () => { outcome.result += 1; });
    return outcome;
  });
  return { ...merged, photos: added };
}

function ifAbsent(rows, row, then) {
  rows.getKey(row.id).onsuccess = (event) => {
    if (event.target.result !== undefined) return;
    rows.put(row);
    then();
  };
}

function parsed(text) {
  try {
    return JSON.parse(text);
  } catch (error) {
    throw new Fault('not_ours', { cause: error });
  }
}

function base64Of(buffer) {
  const bytes = new Uint8Array(buffer);
  let text = '';
  for (let at = 0; at < bytes.length; at += 32768) text += String.fromCharCode(...bytes.subarray(at, at + 32768));
  return btoa(text);
}

function bytesOf(base64) {
  try {
    return Uint8Array.from(atob(base64), (letter) => letter.charCodeAt(0)).buffer;
  } catch {
    return null;
  }
}

const FIRST_BYTES = { 'image/jpeg': [0xff, 0xd8, 0xff], 'image/png': [0x89, 0x50, 0x4e, 0x47], 'image/webp': [0x52, 0x49, 0x46, 0x46] };

function isPicture(buffer, type) {
  const first = new Uint8Array(buffer, 0, Math.min(4, buffer.byteLength));
  return FIRST_BYTES[type].every((byte, at) => first[at] === byte);
}

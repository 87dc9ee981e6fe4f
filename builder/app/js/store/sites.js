/** Site checks: made, listed, loaded, saved; two tabs on one record are noticed, both kept. */
import { Fault } from './faults.js';
import { newId } from './ids.js';
import { canonical, nextVersion, settled, standing } from './merge.js';
import { BY_SITE, PHOTOS, SETTINGS, SIDES, SITES } from './names.js';
import { stamp } from './time.js';
import { inStore } from './tx.js';

export const FORMAT = 1;
/** This page's own mark: what it goes on changing after a conflict stays one side, the latest. */
const PAGE = newId();

/**
 * A new, unsaved site check with nothing answered. Saving it gives revision 1.
 *
 * @param {{region_id: string, edition: string, hash: string}} tables  what will score it
 * @param {object} [start]  fields to start from: name, observer, unit_id, role …
 */
export function newSite(tables, start = {}) {
  const now = stamp();
  return {
    format: FORMAT,
    id: newId(),
    revision: 0,
    region_id: tables.region_id,
    edition: tables.edition,
    pack_hash: tables.hash,
    unit_id: null,
    unit_name: '',
    role: 'inside',
    name: '',
    observer: '',
    created_at: now,
    changed_at: now,
    date: now.slice(0, 10),
    month: Number(now.slice(5, 7)),
    place: { latitude_deg: null, longitude_deg: null, accuracy_m: null, height_m: null, slope_pct: null, aspect_deg: null },
    disturbance: null,
    questions: {},
    findings: [],
    whole_plot_searched: false,
    digging: { cleared: null, by: '', number: '', date: null },
    struck: [],
    call: null,
    overruled: null,
    notes: '',
    photos: [],
    production: {},
    reclaim: {},
    ...start,
  };
}

/** All site checks, last changed first. @param {import('./schema.js').Store} store */
export async function listSites(store) {
  const sites = await inStore(store.records, [SITES], 'readonly', (rows) => rows.getAll());
  return sites.sort((a, b) => (a.changed_at < b.changed_at ? 1 : a.changed_at > b.changed_at ? -1 : 0));
}

/** One site check, or null. */
export async function loadSite(store, id) {
  const site = await inStore(store.records, [SITES], 'readonly', (rows) => rows.get(id));
  if (site && site.format > FORMAT) throw new Fault('newer');
  return site ?? null;
}

/**
 * Saves one change. `site.revision` is the revision it was loaded with. When another tab has saved
 * since, nothing is overwritten: this version is kept beside it (see listSides) and a Fault
 * 'conflict' with `.stored` is thrown.
 *
 * @returns {Promise<object>}  the site as stored, revision one higher
 */
export async function saveSite(store, site) {
  const device = await deviceId(store);
  const next = nextVersion(site, device, stamp());
  const outcome = { result: next, conflict: null };
  await inStore(store.records, [SITES, SIDES], 'readwrite', (sites, sides) => {
    outcome.conflict = null;
    const read = sites.get(site.id);
    read.onsuccess = () => {
      const stored = read.result;
      if ((stored?.revision ?? 0) === site.revision) {
        sites.put(next);
      } else if (!stored || canonical(stored) !== canonical(next)) {
        outcome.conflict = stored ?? next;
        sides.put(sideOf(next, 'tab', PAGE));
      }
    };
    return outcome;
  });
  if (outcome.conflict) throw new Fault('conflict', { stored: outcome.conflict });
  return next;
}

/** Removes a site check with its photos and kept sides. */
export function removeSite(store, id) {
  return inStore(store.records, [SITES, SIDES, PHOTOS], 'readwrite', (sites, ...others) => {
    for (const rows of others) {
      rows.index(BY_SITE).getAllKeys(id).onsuccess = (event) => event.target.result.forEach((key) => rows.delete(key));
    }
    return sites.delete(id);
  });
}

/**
 * Takes in versions from elsewhere: new ones are added, later ones replace, earlier and equal ones
 * do nothing, and of two that each hold changes the other lacks both are kept.
 *
 * @param {object[]} incoming  cleaned site checks
 * @returns {Promise<{added: string[], replaced: string[], kept: string[], same: string[], conflicts: string[]}>}  ids
 */
export function mergeSites(store, incoming) {
  const result = { added: [], replaced: [], kept: [], same: [], conflicts: [] };
  return inStore(store.records, [SITES, SIDES], 'readwrite', (sites, sides) => {
    for (const list of Object.values(result)) list.length = 0;
    for (const theirs of incoming) {
      sites.get(theirs.id).onsuccess = (event) => {
        const mine = event.target.result;
        const verdict = mine ? standing(mine, theirs) : 'new';
        if (verdict === 'new' || verdict === 'theirs') sites.put(theirs);
        if (verdict === 'conflict') sides.put(sideOf(theirs, 'file', checksum(canonical(theirs))));
        const list = { new: 'added', theirs: 'replaced', mine: 'kept', same: 'same', conflict: 'conflicts' }[verdict];
        result[list].push(theirs.id);
      };
    }
    return { result };
  });
}

/** The other sides kept beside a record after a conflict: [{key, site_id, origin, site}]. */
export function listSides(store, siteId) {
  return inStore(store.records, [SIDES], 'readonly', (sides) => (
    siteId ? sides.index(BY_SITE).getAll(siteId) : sides.getAll()));
}

/**
 * Ends a conflict with one side. The record that results holds both sides' changes counted.
 *
 * @param {'mine'|'theirs'} keep  'mine': the stored record; 'theirs': the side
 */
export async function settleSide(store, key, keep) {
  const device = await deviceId(store);
  const outcome = { result: null };
  return inStore(store.records, [SITES, SIDES], 'readwrite', (sites, sides) => {
    sides.get(key).onsuccess = (event) => {
      const side = event.target.result;
      if (!side) return;
      sites.get(side.site_id).onsuccess = (inner) => {
        const mine = inner.target.result ?? side.site;
        const chosen = keep === 'mine' ? settled(mine, side.site, device) : settled(side.site, mine, device);
        outcome.result = { ...chosen, changed_at: stamp() };
        sites.put(outcome.result);
        sides.delete(key);
      };
    };
    return outcome;
  });
}

function sideOf(site, origin, mark) {
  return { key: `${site.id} ${mark}`, site_id: site.id, origin, received_at: stamp(), site };
}

/** A short mark so that the same side arriving twice is one row; no security rests on it. */
function checksum(text) {
  let sum = 2166136261;
  for (let i = 0; i < text.length; i += 1) sum = Math.imul(sum ^ text.charCodeAt(i), 16777619) >>> 0;
  return `${text.length.toString(16)}-${sum.toString(16)}`;
}

/** This device's own id, made once and kept with the records. */
export function deviceId(store) {
  store.device ??= makeDeviceId(store).catch((error) => { store.device = null; throw error; });
  return store.device;
}

function makeDeviceId(store) {
  const outcome = { result: null };
  return inStore(store.records, [SETTINGS], 'readwrite', (settings) => {
    settings.get('device_id').onsuccess = (event) => {
      outcome.result = event.target.result ?? newId().slice(0, 8);
      settings.put(outcome.result, 'device_id');
    };
    return outcome;
  });
}

/** Site checks and units around the open one: start, open under the right tables, list, remove. */
import { call as callOf, unitZone } from '../core/index.js';
import { listSites, listUnits, newSite, newUnit, removeSite, saveSite, saveUnit, tablesOf } from '../store/index.js';
import { makeRegion } from './region.js';
import { observer } from './settings.js';
import { change, fetchSite, go, home, openSite, region, site, sites, store, tables, trouble, units } from './state.js';
import { language, t } from './words.js';

/** Reads every record and unit of this phone. */
export async function readAll() {
  sites.value = await listSites(store.value);
  units.value = await listUnits(store.value);
}

/** Starts a site check and goes to its Place. @param {object} [start] fields to begin with */
export async function startSite(start = {}) {
  const kept = await makeSite(start);
  if (kept) go(`#/site/${kept.id}/place`);
}

/** Another look from here: keeps where, who and which unit; asks the plants again. A spot is noted
 *  on the site check it belongs to; a duplicate stands for itself.
 *  @param {string} name  @param {{role?: string}} [more] */
export async function startSpot(name, more = {}) {
  const { id, unit_id, unit_name, place, disturbance, role, observer: who, spots = [] } = site.value;
  const same = more.role === 'duplicate';
  const near = same ? place : { ...place, latitude_deg: null, longitude_deg: null, accuracy_m: null };
  const kept = await makeSite({ unit_id, unit_name, place: near, disturbance, role, name, observer: same ? '' : who, ...more });
  if (!kept || site.value?.id !== id) return;
  if (!same) change({ spots: [...spots, kept.id] });
  go(`#/site/${kept.id}/${same ? 'place' : 'plants'}`);
}

async function makeSite(start) {
  const first = { observer: observer.value, name: t('sites.default_name', { n: sites.value.length + 1 }), ...start };
  try {
    const kept = await saveSite(store.value, newSite(tables.value, first));
    sites.value = [kept, ...sites.value];
    return kept;
  } catch (fault) {
    trouble.value = { code: fault.code };
    return null;
  }
}

/** Opens the record an address names, under the edition that scored it. */
export async function openById(id) {
  if (site.value?.id === id) return;
  const record = sites.value.find((one) => one.id === id) ?? await fetchSite(id);
  if (!record) {
    go('#/sites', true);
    return;
  }
  region.value = await regionFor(record);
  openSite(record);
}

async function regionFor(record) {
  if (record.pack_hash === tables.value.hash) return home.value;
  const older = await tablesOf(store.value, record);
  return older ? makeRegion(older.pack, older.texts[language.value] ?? older.texts.en) : home.value;
}

/** Leaves the open record; the pages outside use the tables in use. */
export function closeSite() {
  openSite(null);
  region.value = home.value;
}

/** Removes a site check and its photos for good. */
export async function dropSite(id) {
  closeSite();
  await removeSite(store.value, id);
  sites.value = sites.value.filter((one) => one.id !== id);
  go('#/sites', true);
}

const calls = new WeakMap();

/** The call of a listed record, scored once for each stored version; one of three looks, or under
 *  other tables, as it was kept. */
export function rowCall(here, row) {
  const kept = row.call?.looks === 3 || row.pack_hash !== tables.value.hash;
  if (!calls.has(row)) calls.set(row, kept ? row.call : callOf(here.pack, row));
  return calls.get(row);
}

/** A unit by name: the one there is, or a new one. @returns {Promise<object>} */
export async function unitNamed(name) {
  const there = units.value.find((unit) => unit.name.toLowerCase() === name.toLowerCase());
  if (there) return there;
  const unit = await saveUnit(store.value, newUnit(name, home.value.pack.region.id));
  units.value = [...units.value, unit];
  return unit;
}

/** All checks of a unit, the open one as it now stands. */
export function checksOf(unitId) {
  return sites.value.filter((row) => row.unit_id === unitId && row.id !== site.value?.id).concat(site.value?.unit_id === unitId ? [site.value] : []);
}

/** The zone carried into a unit from its edges. */
export function carriedZone(here, unitId) {
  return unitZone(here.pack, checksOf(unitId));
}

/**
 * What screens may use of the store. Everything asynchronous settles: with the result once it is
 * on the disk, or with a Fault whose `.code` has its sentence in words under `store`.
 *
 *   const store = await openStore();                    // Fault 'none' where nothing can be stored
 *   const site = newSite(tables, { observer });          // tables as in tables.js
 *   const writer = siteWriter(store, site, { onSaved, onFault, onLittleRoom });
 *   writer.write({ ...site, name: 'Pad 7' });            // at each change; writer.unsaved, writer.flush()
 *   await listSites(store); await loadSite(store, id); await removeSite(store, id);
 *   await listSides(store, id); await settleSide(store, key, 'mine' | 'theirs');
 *   await addPhoto(store, site.id, { bytes, type });     // photosOf, captionPhoto, removePhoto, photoUrl
 *   await getSetting(store, 'mode'); await setSetting(store, 'mode', 'sun');
 *   const [offer] = await readRegions(); await readWords('en');
 *   const start = await tablesAtStart(store, offer, { readFile, checkProbes });   // see editions.js
 *   await useTables(store, start.offered);               // the person decided
 *   await tablesOf(store, site);                         // the edition that scored an old record
 *   const versions = await watchVersions({ onWaiting, onReplaced, onOffline });    // versions.use()
 *   await askForRoom(store);                             // {persisted, nearly_full}, once at start
 *
 * Handing over is loaded when it is asked for, from exchange.js:
 *   const text = await exportRecords(store, ids, { photos, names });
 *   await takeIn(store, readRecords(text));              // readRecords(…).refused, .changed to be told
 */
import { connections } from './schema.js';
import { opened } from './tx.js';

export { fetchTables, tablesAtStart, tablesInUse, tablesOf, useTables } from './editions.js';
export { Fault, faultOf } from './faults.js';
export { isSingleFile, readFile, readRegions, readWords } from './files.js';
export { newId } from './ids.js';
export { addPhoto, captionPhoto, photosOf, photoUrl, removePhoto } from './photos.js';
export { askForRoom, storageLasts } from './room.js';
export { getSetting, setSetting } from './settings.js';
export { deviceId, listSides, listSites, loadSite, mergeSites, newSite, removeSite, saveSite, settleSide } from './sites.js';
export { dropUnusedTables, keepTables, listTables, loadTables } from './tables.js';
export { stamp } from './time.js';
export { listUnits, newUnit, removeUnit, saveUnit } from './units.js';
export { watchVersions } from './updates.js';
export { siteWriter } from './writer.js';

/**
 * Opens both databases.
 *
 * @returns {Promise<import('./schema.js').Store>}
 */
export async function openStore() {
  const store = connections();
  await opened(store.records);
  await opened(store.packs);
  return store;
}

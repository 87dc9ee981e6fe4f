/** Region tables kept by hash, so that an old record opens under the edition that scored it. */
import { BY_REGION, SITES, TABLES } from './names.js';
import { inStore } from './tx.js';

/**
 * @typedef {object} Tables
 * @property {string} hash  of the pack; records name it as pack_hash
 * @property {string} region_id
 * @property {string} edition
 * @property {string} date
 * @property {object} pack
 * @property {Record<string, object>} texts  by language
 */

/** @param {import('./schema.js').Store} store @param {Tables} tables */
export function keepTables(store, tables) {
  return inStore(store.packs, [TABLES], 'readwrite', (rows) => rows.put(tables));
}

/** @returns {Promise<Tables|null>} */
export async function loadTables(store, hash) {
  return (await inStore(store.packs, [TABLES], 'readonly', (rows) => rows.get(hash))) ?? null;
}

/** All editions kept of a region. @returns {Promise<Tables[]>} */
export function listTables(store, regionId) {
  return inStore(store.packs, [TABLES], 'readonly', (rows) => rows.index(BY_REGION).getAll(regionId));
}

/**
 * Drops editions that no record was scored with and that are not in use.
 *
 * @param {string[]} inUse  hashes to keep in any case
 * @returns {Promise<string[]>} hashes dropped
 */
export async function dropUnusedTables(store, inUse) {
  const sites = await inStore(store.records, [SITES], 'readonly', (rows) => rows.getAll());
  const needed = new Set([...inUse, ...sites.map((site) => site.pack_hash)]);
  const outcome = { result: [] };
  return inStore(store.packs, [TABLES], 'readwrite', (rows) => {
    rows.getAllKeys().onsuccess = (event) => {
      outcome.result = event.target.result.filter((hash) => !needed.has(hash));
      for (const hash of outcome.result) rows.delete(hash);
    };
    return outcome;
  });
}

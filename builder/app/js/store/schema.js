/** The two databases and every step of their history, oldest first. */
import { BY_REGION, BY_SITE, BY_UNIT, PACKS, PHOTOS, RECORDS, SETTINGS, SIDES, SITES, TABLES, UNITS } from './names.js';
import { connectionTo } from './tx.js';

export const RECORD_STEPS = [
  (db) => {
    db.createObjectStore(SITES, { keyPath: 'id' }).createIndex(BY_UNIT, 'unit_id');
    db.createObjectStore(SIDES, { keyPath: 'key' }).createIndex(BY_SITE, 'site_id');
    db.createObjectStore(UNITS, { keyPath: 'id' });
    db.createObjectStore(PHOTOS, { keyPath: 'id' }).createIndex(BY_SITE, 'site_id');
    db.createObjectStore(SETTINGS);
  },
];

export const PACK_STEPS = [
  (db) => {
    db.createObjectStore(TABLES, { keyPath: 'hash' }).createIndex(BY_REGION, 'region_id');
  },
];

/**
 * @typedef {object} Store
 * @property {import('./tx.js').Connection} records
 * @property {import('./tx.js').Connection} packs
 */

/** @returns {Store} */
export function connections() {
  return { records: connectionTo(RECORDS, RECORD_STEPS), packs: connectionTo(PACKS, PACK_STEPS) };
}

/** Every name the store uses: databases, object stores, indexes. */

/** The crew's own records. No update of app or tables touches this database. */
export const RECORDS = 'beltbook-records';
/** Tables as they were installed, one row per edition, found by hash. */
export const PACKS = 'beltbook-packs';

export const SITES = 'sites';
export const SIDES = 'sides';
export const UNITS = 'units';
export const PHOTOS = 'photos';
export const SETTINGS = 'settings';
export const TABLES = 'tables';

export const BY_SITE = 'site_id';
export const BY_UNIT = 'unit_id';
export const BY_REGION = 'region_id';

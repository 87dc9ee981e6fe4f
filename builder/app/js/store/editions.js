/**
 * Which edition of a region's tables is in use, and how a new one comes in.
 *
 * A new edition is fetched, its bytes are compared with the hashes in regions.json, and its probes
 * are answered on this phone. One difference and the old edition stays. An edition that agrees is
 * kept beside the old one and offered; the person decides. Nothing here touches a record.
 */
import { Fault } from './faults.js';
import { hexOf } from './ids.js';
import { getSetting, setSetting } from './settings.js';
import { keepTables, loadTables } from './tables.js';

const IN_USE = 'tables_in_use ';

/**
 * @typedef {object} RegionOffer  one entry of regions.json
 * @property {string} id
 * @property {string} name
 * @property {string} edition
 * @property {string} date
 * @property {{path: string, hash: string, sha256: string}} pack
 * @property {Record<string, {path: string, sha256: string}>} texts
 */

/**
 * @typedef {object} AtStart
 * @property {'ready'|'offered'|'kept'|'refused'} state
 *   ready: the newest edition is in use · offered: a newer one waits for the person ·
 *   kept: a newer one could not be taken, the old one is in use · refused: there is none to use
 * @property {import('./tables.js').Tables|null} tables  in use
 * @property {import('./tables.js').Tables|null} offered
 * @property {Fault|null} fault  why `kept` or `refused`
 * @property {object|null} unproved  on a first install whose probes differ: tables for the Book only
 */

/**
 * Brings the region's tables into use or says why not.
 *
 * @param {import('./schema.js').Store} store
 * @param {RegionOffer} offer
 * @param {{readFile: (path: string) => Promise<string>,
 *          checkProbes: (pack: object) => object[]}} means  readFile of files.js; checkProbes of core
 * @returns {Promise<AtStart>}
 */
export async function tablesAtStart(store, offer, means) {
  const inUse = await tablesInUse(store, offer.id);
  const done = (state, more = {}) => ({ state, tables: inUse, offered: null, fault: null, unproved: null, ...more });
  if (inUse && inUse.hash === offer.pack.hash) {
    await addLanguages(store, inUse, offer, means.readFile);
    return done('ready');
  }
  let fresh = null;
  try {
    fresh = (await loadTables(store, offer.pack.hash)) ?? (await fetchTables(offer, means.readFile));
    const differences = means.checkProbes(fresh.pack);
    if (differences.length > 0) throw new Fault('probes', { cause: differences });
    await keepTables(store, fresh);
  } catch (error) {
    const fault = error instanceof Fault ? error : new Fault('unread', { cause: error });
    return inUse ? done('kept', { fault }) : done('refused', { fault, unproved: fresh });
  }
  if (inUse) return done('offered', { offered: fresh });
  await useTables(store, fresh);
  return done('ready', { tables: fresh });
}

/** The tables in use for new site checks of a region, or null. */
export async function tablesInUse(store, regionId) {
  const hash = await getSetting(store, IN_USE + regionId);
  return hash ? loadTables(store, hash) : null;
}

/** The person has decided: new site checks use these tables from now on. */
export function useTables(store, tables) {
  return setSetting(store, IN_USE + tables.region_id, tables.hash);
}

/**
 * The tables that scored a record, so that it gives the same digits.
 *
 * @returns {Promise<import('./tables.js').Tables|null>} null where this phone never had that edition
 */
export function tablesOf(store, site) {
  return loadTables(store, site.pack_hash);
}

/** Fetches pack and texts and compares each with its hash. @param {RegionOffer} offer */
export async function fetchTables(offer, readFile) {
  const pack = JSON.parse(await fetchWhole(offer.pack, readFile));
  const texts = {};
  for (const [language, part] of Object.entries(offer.texts)) {
    texts[language] = JSON.parse(await fetchWhole(part, readFile));
  }
  return { hash: offer.pack.hash, region_id: offer.id, edition: offer.edition, date: offer.date, pack, texts };
}

async function fetchWhole(part, readFile) {
  const text = await readFile(part.path);
  // Web Cryptography exists only on https and loopback; elsewhere only the probes speak.
  if (globalThis.crypto?.subtle) {
    const digest = await crypto.subtle.digest('SHA-256', new TextEncoder().encode(text));
    if (hexOf(new Uint8Array(digest)) !== part.sha256) throw new Fault('torn');
  }
  return text;
}

/** A later app version may know another language for the same edition. */
async function addLanguages(store, inUse, offer, readFile) {
  const missing = Object.keys(offer.texts).filter((language) => !(language in inUse.texts));
  if (missing.length === 0) return;
  for (const language of missing) {
    inUse.texts[language] = JSON.parse(await fetchWhole(offer.texts[language], readFile));
  }
  await keepTables(store, inUse);
}

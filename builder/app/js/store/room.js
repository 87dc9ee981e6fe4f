/**
 * Whether what is stored will last, and how much room is left.
 *
 * Browsers no longer tell the true quota (measured: Chromium answers "10 GB free" whatever the limit
 * is), so room is kept instead of guessed: a reserve is laid down, and given up when the phone is
 * full, so that what was just entered still finds its place.
 */
import { SETTINGS } from './names.js';
import { getSetting, setSetting } from './settings.js';
import { inStore } from './tx.js';

/** Room for several hundred site checks without photos. */
const RESERVE_BYTES = 1_000_000;
const RESERVE = 'reserve';

/**
 * Asks the browser to keep the records and lays down the reserve.
 *
 * @param {import('./schema.js').Store} store
 * @returns {Promise<{persisted: boolean, nearly_full: boolean}>} nearly_full: no room for the reserve
 */
export async function askForRoom(store) {
  return { persisted: await askToPersist(), nearly_full: !(await layReserve(store)) };
}

async function askToPersist() {
  const storage = globalThis.navigator?.storage;
  try {
    return (await storage.persisted()) || (await storage.persist());
  } catch {
    return false;
  }
}

async function layReserve(store) {
  if (await getSetting(store, RESERVE)) return true;
  try {
    await setSetting(store, RESERVE, noise(RESERVE_BYTES));
    return true;
  } catch {
    return false;
  }
}

/** Bytes that no disk packs smaller: a megabyte of zeros took 48 kB in Chromium and freed as little. */
function noise(size) {
  const bytes = new Uint8Array(size);
  const most = 65536;
  for (let at = 0; at < size; at += most) crypto.getRandomValues(bytes.subarray(at, Math.min(size, at + most)));
  return bytes.buffer;
}

/**
 * Gives the reserve up. Deleting needs no room.
 *
 * @returns {Promise<boolean>} false where there was none left
 */
export function spendReserve(store) {
  const outcome = { result: false };
  return inStore(store.records, [SETTINGS], 'readwrite', (settings) => {
    settings.getKey(RESERVE).onsuccess = (event) => {
      outcome.result = event.target.result !== undefined;
      settings.delete(RESERVE);
    };
    return outcome;
  });
}

/**
 * Whether a page opened as a plain file may be trusted with records. File viewers of phones show
 * such a page without lasting storage; a browser on a computer keeps it. Only an earlier visit's
 * mark, or the browser's promise, proves it.
 *
 * @returns {Promise<'lasts'|'unproven'|'none'>}
 */
export async function storageLasts(store) {
  try {
    const seen = await getSetting(store, 'first_opened');
    if (!seen) await setSetting(store, 'first_opened', Date.now());
    if (seen || (await askToPersist())) return 'lasts';
    return ['file:', 'http:', 'https:'].includes(globalThis.location?.protocol) ? 'unproven' : 'none';
  } catch {
    return 'none';
  }
}

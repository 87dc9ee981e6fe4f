/** Whether what is stored will last, and how much room is left. */
import { getSetting, setSetting } from './settings.js';

/** Under this much free room the person is told in time: about twenty downscaled photos. */
export const LITTLE_ROOM_BYTES = 10_000_000;

/**
 * Asks the browser to keep the records, and how full it is.
 *
 * @returns {Promise<{persisted: boolean, usage_bytes: number|null, quota_bytes: number|null, nearly_full: boolean}>}
 */
export async function askForRoom() {
  const storage = globalThis.navigator?.storage;
  const persisted = (await attempt(() => storage?.persisted?.())) || (await attempt(() => storage?.persist?.())) || false;
  const { usage = null, quota = null } = (await attempt(() => storage?.estimate?.())) ?? {};
  const nearly_full = quota !== null && usage !== null && quota - usage < LITTLE_ROOM_BYTES;
  return { persisted, usage_bytes: usage, quota_bytes: quota, nearly_full };
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
    if (seen || (await askForRoom()).persisted) return 'lasts';
    return globalThis.location?.protocol === 'file:' || globalThis.isSecureContext ? 'unproven' : 'none';
  } catch {
    return 'none';
  }
}

async function attempt(ask) {
  try {
    return await ask();
  } catch {
    return null;
  }
}

/**
 * Writes one open site check, change after change. Changes that arrive while one is being written
 * are written next as one; the revision is counted here, so a page never waits for the disk.
 */
import { spendReserve } from './room.js';
import { saveSite } from './sites.js';

/**
 * @param {import('./schema.js').Store} store
 * @param {object} site  as loaded or new
 * @param {{onSaved?: (site: object) => void, onFault?: (fault: import('./faults.js').Fault) => void,
 *          onLittleRoom?: () => void}} [tell]
 *   `onSaved` after the change is on the disk; `onFault` when it is not; `onLittleRoom` when it only
 *   found its place because the reserve was given up
 */
export function siteWriter(store, site, tell = {}) {
  let stored = site;
  let waiting = null;
  let running = null;

  async function saved(next) {
    try {
      return await saveSite(store, next);
    } catch (fault) {
      if (fault.code !== 'full' || !(await spendReserve(store))) throw fault;
    }
    const site = await saveSite(store, next);
    tell.onLittleRoom?.();
    return site;
  }

  async function run() {
    while (waiting) {
      const change = waiting;
      waiting = null;
      try {
        stored = await saved({ ...change, revision: stored.revision, edits: stored.edits });
        tell.onSaved?.(stored);
      } catch (fault) {
        // Kept for the next try: the page still shows what the person entered.
        if (fault.code !== 'conflict') waiting ??= change;
        tell.onFault?.(fault);
        throw fault;
      }
    }
  }

  function flush() {
    running ??= run().finally(() => { running = null; });
    return running.then(() => stored);
  }

  return {
    /** Hands over the record as it stands now. @returns {Promise<object>} once it is on the disk */
    write(next) {
      waiting = next;
      return flush();
    },
    /** Tries again what a fault held back; settles when nothing waits. */
    flush,
    /** True while something entered is not on the disk yet. */
    get unsaved() { return waiting !== null || running !== null; },
    /** The record as last stored. */
    get stored() { return stored; },
  };
}

/** This phone's settings: mode, hand, units, language, observer, which tables are in use. */
import { SETTINGS } from './names.js';
import { inStore } from './tx.js';

/** @param {import('./schema.js').Store} store @returns {Promise<any>} undefined where never set */
export function getSetting(store, name) {
  return inStore(store.records, [SETTINGS], 'readonly', (settings) => settings.get(name));
}

export function setSetting(store, name, value) {
  return inStore(store.records, [SETTINGS], 'readwrite', (settings) => settings.put(value, name));
}

/** Units: pieces of disturbed ground that site checks belong to. */
import { newId } from './ids.js';
import { UNITS } from './names.js';
import { stamp } from './time.js';
import { inStore } from './tx.js';

/** @param {string} name */
export function newUnit(name, region_id) {
  const now = stamp();
  return { format: 1, id: newId(), name, region_id, disturbance: null, year_sown: null, notes: '', created_at: now, changed_at: now };
}

export async function listUnits(store) {
  const units = await inStore(store.records, [UNITS], 'readonly', (rows) => rows.getAll());
  return units.sort((a, b) => (a.created_at < b.created_at ? -1 : a.created_at > b.created_at ? 1 : 0));
}

export async function saveUnit(store, unit) {
  const next = { ...unit, changed_at: stamp() };
  await inStore(store.records, [UNITS], 'readwrite', (rows) => rows.put(next));
  return next;
}

/** Removes the unit; its site checks stay and become units of one. */
export function removeUnit(store, id) {
  return inStore(store.records, [UNITS], 'readwrite', (rows) => rows.delete(id));
}

/** What the person has chosen for this phone: mode, hand, units, observer. Kept apart from records. */
import { signal, effect } from '@preact/signals';

const KEY = 'beltbook.settings';

function read() {
  try {
    return JSON.parse(localStorage.getItem(KEY) ?? '{}');
  } catch {
    return {};
  }
}

const kept = read();
export const mode = signal(document.documentElement.dataset.mode);
export const hand = signal(document.documentElement.dataset.hand);
export const units = signal(kept.units ?? null);
export const observer = signal(kept.observer ?? '');
export const initials = signal(kept.initials ?? true);

/** Units of the region until the person picks their own. @param {'metric'|'us'} own */
export function unitsFrom(own) {
  if (!units.value) units.value = own;
}

effect(() => {
  document.documentElement.dataset.mode = mode.value;
  document.documentElement.dataset.hand = hand.value;
  const all = { mode: mode.value, hand: hand.value, units: units.value, observer: observer.value, initials: initials.value };
  try {
    localStorage.setItem(KEY, JSON.stringify(all));
  } catch {
    // A phone that keeps nothing still works for this visit; Setup says whether storage lasts.
  }
});

const NEXT = { day: 'sun', sun: 'night', night: 'day' };

/** Day, then sun, then night, by one key. */
export function turnMode() {
  mode.value = NEXT[mode.value];
}

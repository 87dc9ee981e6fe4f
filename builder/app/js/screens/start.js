/** What was found at the start: languages and regions on offer, tables in use, room, a waiting version. */
import { signal } from '@preact/signals';

const KEY = 'beltbook.start';

function kept() {
  try {
    return JSON.parse(localStorage.getItem(KEY) ?? '{}');
  } catch {
    return {};
  }
}

const NOTHING = { language: null, region: null, languages: {}, offers: [], edition: null, bookOnly: false, room: null, waiting: false, offline: false, versions: null };

export const start = signal({ ...NOTHING, ...kept() });

/** Adds what was found. @param {Partial<typeof NOTHING>} more */
export function found(more) {
  start.value = { ...start.value, ...more };
}

/** Keeps the language or region to begin with next time. @param {{language?: string, region?: string}} wish */
export function beginWith(wish) {
  localStorage.setItem(KEY, JSON.stringify({ language: start.value.language, region: start.value.region, ...wish }));
}

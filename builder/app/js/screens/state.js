/** The session: which page, which site check, which tables. Records go through the store's writer. */
import { computed, signal } from '@preact/signals';
import { call as callOf } from '../core/index.js';
import { loadSite, siteWriter } from '../store/index.js';

export const store = signal(null);
export const tables = signal(null);
export const region = signal(null);
export const home = signal(null);
export const sites = signal([]);
export const units = signal([]);
export const site = signal(null);
export const trouble = signal(null);
export const spoken = signal('');
export const route = signal(parseRoute(location.hash));
const undoable = signal([]);

/** "#/site/ID/plants/find" → {page: 'site', parts: ['ID', 'plants', 'find']} */
export function parseRoute(hash) {
  const [page, ...parts] = hash.replace(/^#\/?/, '').split('/').map(decodeURIComponent);
  return { page: page || 'sites', parts };
}

/** Goes to a page. @param {string} to hash  @param {boolean} [replace] leave no step for Back */
export function go(to, replace = false) {
  if (!replace) {
    location.hash = to;
    return;
  }
  history.replaceState(null, '', to);
  route.value = parseRoute(to);
}

export const hashOf = (tab = 'plants') => `#/site/${site.value.id}/${tab}`;

/** Reads a phrase to those who listen; the same phrase twice is still read. */
export function say(words) {
  spoken.value = spoken.value === words ? `${words}\u00a0` : words;
}

/** The key's answer for the open site check; null while none is open. Scored again only when
 *  something that is scored has changed. */
export const call = computed(() => (site.value && region.value ? scored(region.value.pack, site.value) : null));

const SCORED = ['id', 'place', 'month', 'disturbance', 'questions', 'findings', 'whole_plot_searched', 'struck', 'digging'];
let last = { site: null, pack: null, answer: null };

function scored(pack, record) {
  const same = last.pack === pack && last.site && SCORED.every((field) => last.site[field] === record[field]);
  if (!same) last = { site: record, pack, answer: callOf(pack, record) };
  return last.answer;
}

let writer = null;

/** Opens a record for change, or closes with null; undo starts anew with each record. */
export function openSite(record) {
  writeNow();
  undoable.value = [];
  trouble.value = null;
  writer = record && siteWriter(store.value, record, { onSaved, onFault, onLittleRoom });
  site.value = record;
}

function onSaved(stored) {
  if (trouble.value?.code !== 'little_room') trouble.value = null;
  sites.value = [stored, ...sites.value.filter((one) => one.id !== stored.id)];
}

function onLittleRoom() {
  trouble.value = { code: 'little_room' };
}

function onFault(fault) {
  trouble.value = { code: fault.code };
}

/** Settles when everything changed so far is on the disk; rejects with the store's fault. */
export function saved() {
  writeNow();
  return writer ? writer.flush() : Promise.resolve();
}

/** True while something entered is not on the disk. */
export const unsaved = () => due !== null || Boolean(writer?.unsaved);

/** Changes fields of the open site check, keeps them at once, and remembers the way back.
 *  @param {object} patch  @param {string|null} [told] what was done, for the line beside Undo; without it (typing) Undo skips it */
export function change(patch, told = null) {
  const before = site.value;
  const old = Object.fromEntries(Object.keys(patch).map((key) => [key, before[key]]));
  if (told) undoable.value = [...undoable.value.slice(-49), { old, told }];
  put({ ...before, ...patch });
}

let due = null;

/** Paints first: writing begins in the next turn, a few thousandths of a second later. */
function put(next) {
  site.value = next;
  due ??= setTimeout(writeNow, 0);
}

function writeNow() {
  if (due === null) return;
  clearTimeout(due);
  due = null;
  // A fault is told by onFault; the writer keeps the change for its next try.
  writer.write(site.value).catch(() => {});
}

/** The last change that Undo would take back, or null. */
export const lastChange = computed(() => undoable.value.at(-1) ?? null);

/** Takes the last change back. */
export function undo() {
  const change_ = undoable.value.at(-1);
  if (!change_) return;
  undoable.value = undoable.value.slice(0, -1);
  put({ ...site.value, ...change_.old });
}

/** The stored form of a record, for a page that was opened by its address. */
export const fetchSite = (id) => loadSite(store.value, id);

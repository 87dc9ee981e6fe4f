/** Every sentence of the screens comes from one words file; this looks it up and fills its places.
 *  A key that is missing throws: a page with a hole in it must not pass a test. */
import { signal } from '@preact/signals';
import { rounded } from '../core/rounding.js';

export const words = signal({});
export const language = signal('en');

/** @param {object} table nested words, as in words/en.yaml  @param {string} code language tag
 *  @param {object|null} [over] words of another language laid over them; what it lacks stays English */
export function setWords(table, code, over = null) {
  words.value = over ? laidOver(table, over) : table;
  language.value = code;
}

/** A branch without plurals of its own kind is joined key by key; a leaf or a plural entry is replaced. */
function laidOver(table, over) {
  const joined = { ...table };
  for (const [key, value] of Object.entries(over)) {
    const branch = value !== null && typeof value === 'object' && typeof table[key] === 'object' && !('other' in value && 'one' in value);
    joined[key] = branch ? laidOver(table[key], value) : value;
  }
  return joined;
}

const makers = new Map();

/** An Intl formatter, made once: making one costs more than a whole answer does. */
function maker(kind, options) {
  const tag = language.value === 'en' ? 'en-GB' : language.value;
  const name = `${kind} ${tag} ${JSON.stringify(options)}`;
  if (!makers.has(name)) makers.set(name, new Intl[kind](tag, options));
  return makers.get(name);
}

/** The words under a dotted key, with {places} filled; a plural entry {one, other} is chosen by `n`.
 *  @param {string} key  @param {Record<string, string|number>} [places] */
export function t(key, places = {}) {
  let entry = words.value;
  for (const part of key.split('.')) entry = entry?.[part];
  if (entry === undefined) throw new Error(`no words for ${key}`);
  if (typeof entry === 'object') entry = entry[maker('PluralRules', {}).select(places.n)] ?? entry.other;
  return entry.replace(/\{(\w+)\}/g, (_, name) => {
    if (!(name in places)) throw new Error(`${key} wants {${name}}`);
    const value = places[name];
    return typeof value === 'number' ? figure(value) : value;
  });
}

/** A figure as it is, with two decimals at most. @param {number} value */
function figure(value) {
  return maker('NumberFormat', { maximumFractionDigits: 2 }).format(value);
}

/** With a capital first letter, to begin a line. @param {string} text */
export const sentence = (text) => text.charAt(0).toLocaleUpperCase(language.value) + text.slice(1);

/** True where the words file holds the key. @param {string} key */
export function has(key) {
  return key.split('.').reduce((entry, part) => entry?.[part], words.value) !== undefined;
}

/** A figure as people write it, by the one rounding rule. @param {number} value  @param {number} [decimals] digits after the point */
export function number(value, decimals = 0) {
  return maker('NumberFormat', { minimumFractionDigits: decimals, maximumFractionDigits: decimals }).format(rounded(value, decimals));
}

/** "a, b and c". @param {string[]} parts */
export function listed(parts) {
  return maker('ListFormat', { type: 'conjunction' }).format(parts);
}

/** Friday 11 July, from "2026-07-11". @param {string} iso */
export function dayName(iso) {
  const [year, month, day] = iso.split('-').map(Number);
  return maker('DateTimeFormat', { weekday: 'long', day: 'numeric', month: 'long' })
    .format(new Date(year, month - 1, day));
}

/** July, from 7. @param {number} month  @param {'long'|'short'|'narrow'} [style] */
export function monthName(month, style = 'long') {
  return maker('DateTimeFormat', { month: style }).format(new Date(2000, month - 1, 1));
}

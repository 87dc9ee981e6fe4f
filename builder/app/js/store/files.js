/** Reads a file of the app: from the page itself in the single-file edition, else by its path. */
import { Fault } from './faults.js';

/**
 * @param {string} path  from the root of the site, e.g. "regions/x/pack.json"
 * @returns {Promise<string>}
 */
export async function readFile(path) {
  const inside = document.querySelector(`script[type="application/json"][data-path="${CSS.escape(path)}"]`);
  if (inside) return inside.textContent;
  let response;
  try {
    response = await fetch(new URL(path, document.baseURI));
  } catch (error) {
    throw new Fault('unread', { cause: error });
  }
  if (!response.ok) throw new Fault('unread', { cause: new Error(`${path}: ${response.status}`) });
  return response.text();
}

/** True in field.html, which carries all its files inside. */
export function isSingleFile() {
  return document.querySelector('script[data-path]') !== null;
}

/** The regions of this site, as the builder listed them. @returns {Promise<object[]>} */
export async function readRegions() {
  return JSON.parse(await readFile('regions.json')).regions;
}

/** The words of one language. @param {string} language */
export async function readWords(language) {
  return JSON.parse(await readFile(`app/words/${language}.json`));
}

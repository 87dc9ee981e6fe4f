/**
 * Which of two versions of one record stands. Pure: no storage, no clock.
 *
 * Every device counts its own changes in `edits: {device_id: n}`; `revision` is their sum. A
 * version stands over another when it holds all of the other's changes. Two that each hold a change
 * the other lacks are a conflict, and both are kept. Clocks are not asked: phones' clocks are wrong.
 */

/** @typedef {'same'|'mine'|'theirs'|'conflict'} Standing */

/**
 * @param {object} mine
 * @param {object} theirs  same id
 * @returns {Standing}
 */
export function standing(mine, theirs) {
  if (canonical(mine) === canonical(theirs)) return 'same';
  const a = mine.edits ?? {};
  const b = theirs.edits ?? {};
  const devices = [...Object.keys(a), ...Object.keys(b)];
  const ahead = devices.some((device) => countOf(a, device) > countOf(b, device));
  const behind = devices.some((device) => countOf(b, device) > countOf(a, device));
  if (ahead !== behind) return ahead ? 'mine' : 'theirs';
  if (devices.length === 0 && mine.revision !== theirs.revision) {
    return mine.revision > theirs.revision ? 'mine' : 'theirs';
  }
  return 'conflict';
}

/**
 * The version that settles a conflict: the chosen content, holding both sides' changes, so that it
 * stands over either of them on every phone.
 *
 * @param {object} chosen
 * @param {object} other
 * @param {string} device
 */
export function settled(chosen, other, device) {
  const edits = { ...chosen.edits };
  for (const [name, n] of Object.entries(other.edits ?? {})) edits[name] = Math.max(countOf(edits, name), n);
  edits[device] = countOf(edits, device) + 1;
  return { ...chosen, edits, revision: Math.max(sum(edits), chosen.revision + 1, other.revision + 1) };
}

/**
 * The next version of a record changed on this device.
 *
 * @param {object} site
 * @param {string} device
 * @param {string} changed_at  ISO time with offset
 */
export function nextVersion(site, device, changed_at) {
  const edits = { ...site.edits, [device]: (site.edits?.[device] ?? 0) + 1 };
  return { ...site, edits, revision: site.revision + 1, changed_at };
}

// A device may be named like something every object has.
const countOf = (edits, device) => (Object.hasOwn(edits, device) ? edits[device] : 0);
const sum = (edits) => Object.values(edits).reduce((total, n) => total + n, 0);

/** One text per content: keys sorted, nothing left out. @param {unknown} value */
export function canonical(value) {
  return JSON.stringify(value, (_, part) => (part && typeof part === 'object' && !Array.isArray(part)
    ? Object.fromEntries(Object.keys(part).sort().map((key) => [key, part[key]]))
    : part));
}

/** The moment as ISO text with this phone's offset, so that the day stays the crew's day. */

/** @param {Date} [now] @returns {string}  e.g. 2026-07-04T09:30:00-06:00 */
export function stamp(now = new Date()) {
  const minutes = -now.getTimezoneOffset();
  const local = new Date(now.getTime() + minutes * 60000).toISOString().slice(0, 19);
  const size = Math.abs(minutes);
  const two = (n) => String(n).padStart(2, '0');
  return `${local}${minutes < 0 ? '-' : '+'}${two(Math.floor(size / 60))}:${two(size % 60)}`;
}

/** A typed figure between two limits, or null. Takes a decimal comma. */
export function readNumber(text, low, high) {
  const value = Number(String(text).trim().replace(',', '.'));
  return String(text).trim() === '' || !Number.isFinite(value) || value < low || value > high ? null : value;
}

/** True where something is typed that is no number between the limits. @param {string} text @param {[number, number]|undefined} limits */
export const isWrong = (text, limits) => Boolean(limits) && text.trim() !== '' && readNumber(text, ...limits) === null;

/** The one rounding rule of builder and phone: halves up. */

/** Whole number, halves up. @param {number} value */
export function roundHalfUp(value) {
  return Math.floor(value + 0.5);
}

/** To 1e-6, halves up: belief, gain and fit before any comparison. @param {number} value */
export function round6(value) {
  return Math.floor(value * 1e6 + 0.5) / 1e6;
}

/** Natural log units in one centiban. */
export const NATS_PER_CENTIBAN = Math.LN10 / 100;

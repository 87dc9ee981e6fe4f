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

/**
 * A number as text with so many decimals, halves up on the shortest decimal of the number:
 * 2.675 -> "2.68", -2.5 -> "-2". Minus zero is written as zero. Twin of
 * builder/formulas/rounding.py; `toFixed` looks at the binary value and differs.
 *
 * @param {number} value
 * @param {number} digits decimals, 0 or more
 */
export function shown(value, digits) {
  if (typeof value !== 'number' || !Number.isFinite(value)) {
    throw Object.assign(new RangeError('not_a_number'), { values: { field: 'value', value } });
  }
  const [mantissa, exponent] = Math.abs(value).toExponential().split('e');
  const figures = mantissa.replace('.', '');
  const scale = BigInt(digits) + BigInt(exponent) - BigInt(figures.length - 1);
  let whole = BigInt(figures);
  if (scale >= 0n) whole *= 10n ** scale;
  else {
    const unit = 10n ** -scale;
    const rest = whole % unit;
    const half = 2n * rest;
    whole /= unit;
    if (half > unit || (half === unit && value > 0)) whole += 1n;
  }
  const text = whole.toString().padStart(digits + 1, '0');
  const point = text.length - digits;
  const shape = digits ? `${text.slice(0, point)}.${text.slice(point)}` : text;
  return value < 0 && whole !== 0n ? `-${shape}` : shape;
}

/** The number nearest to its `shown` text. @param {number} value @param {number} digits */
export function rounded(value, digits) {
  return Number(shown(value, digits));
}

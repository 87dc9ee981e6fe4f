/** The two curves behind every interval, small: the normal and Student's t. */
import { needAboveZero, needNumber, needOpenShare } from './refusal.js';

const poly = (/** @type {number[]} */ c, /** @type {number} */ x) => c.reduceRight((s, a) => s * x + a, 0);

/** erfc by series near zero and by a continued fraction beyond. */
function erfc(x) {
  if (x < 0) return 2 - erfc(-x);
  if (x < 2) {
    let term = x;
    let total = x;
    for (let n = 1; Math.abs(term) > 1e-18 * Math.abs(total); n += 1) {
      term *= (-x * x) / n;
      total += term / (2 * n + 1);
      if (n > 200) break;
    }
    return 1 - (2 / Math.sqrt(Math.PI)) * total;
  }
  if (x > 27) return 0;
  let tail = 0;
  for (let n = 120; n >= 1; n -= 1) tail = n / 2 / (x + tail);
  return Math.exp(-x * x) / ((x + tail) * Math.sqrt(Math.PI));
}

/** Share of the standard normal below z. @param {{z: number}} of */
export function normalBelow({ z }) {
  return erfc(-needNumber('z', z) / Math.SQRT2) / 2;
}

// Wichura (1988), algorithm AS 241, the same as Python's statistics.NormalDist.
const CENTRE = [
  [3.387132872796366608, 133.14166789178437745, 1971.5909503065514427, 13731.693765509461125,
    45921.953931549871457, 67265.770927008700853, 33430.575583588128105, 2509.0809287301226727],
  [1, 42.313330701600911252, 687.1870074920579083, 5394.1960214247511077, 21213.794301586595867,
    39307.89580009271061, 28729.085735721942674, 5226.495278852545925],
];
const NEAR = [
  [1.42343711074968357734, 4.6303378461565452959, 5.7694972214606914055, 3.64784832476320460504,
    1.27045825245236838258, 0.24178072517745061177, 0.0227238449892691845833,
    7.7454501427834140764e-4],
  [1, 2.05319162663775882187, 1.6763848301838038494, 0.68976733498510000455,
    0.14810397642748007459, 0.0151986665636164571966, 5.475938084995344946e-4,
    1.05075007164441684324e-9],
];
const FAR = [
  [6.6579046435011037772, 5.4637849111641143699, 1.7848265399172913358, 0.29656057182850489123,
    0.026532189526576123093, 0.0012426609473880784386, 2.71155556874348757815e-5,
    2.01033439929228813265e-7],
  [1, 0.59983220655588793769, 0.13692988092273580531, 0.0148753612908506148525,
    7.868691311456132591e-4, 1.8463183175100546818e-5, 1.4215117583164458887e-7,
    2.04426310338993978564e-15],
];

/** Value below which a share of the standard normal lies. @param {{share: number}} of */
export function normalQuantile({ share }) {
  const p = needOpenShare('share', share);
  const q = p - 0.5;
  if (Math.abs(q) <= 0.425) {
    const r = 0.180625 - q * q;
    return (q * poly(CENTRE[0], r)) / poly(CENTRE[1], r);
  }
  const r = Math.sqrt(-Math.log(q <= 0 ? p : 1 - p));
  const [top, foot, shift] = r <= 5 ? [...NEAR, 1.6] : [...FAR, 5];
  const size = poly(/** @type {number[]} */ (top), r - shift) / poly(/** @type {number[]} */ (foot), r - shift);
  return q < 0 ? -size : size;
}

const LANCZOS = [
  0.99999999999980993, 676.5203681218851, -1259.1392167224028, 771.32342877765313,
  -176.61502916214059, 12.507343278686905, -0.13857109526572012, 9.9843695780195716e-6,
  1.5056327351493116e-7,
];

function logGamma(x) {
  if (x < 0.5) return Math.log(Math.PI / Math.sin(Math.PI * x)) - logGamma(1 - x);
  const z = x - 1;
  const t = z + 7.5;
  let total = LANCZOS[0];
  for (let i = 1; i < 9; i += 1) total += LANCZOS[i] / (z + i);
  return 0.5 * Math.log(2 * Math.PI) + (z + 0.5) * Math.log(t) - t + Math.log(total);
}

/** Regularised incomplete beta, by Lentz's continued fraction. */
function beta(x, a, b) {
  if (x <= 0) return 0;
  if (x >= 1) return 1;
  if (x > (a + 1) / (a + b + 2)) return 1 - beta(1 - x, b, a);
  const front = Math.exp(
    logGamma(a + b) - logGamma(a) - logGamma(b) + a * Math.log(x) + b * Math.log1p(-x),
  );
  let c = 1;
  let d = 1 / (1 - ((a + b) * x) / (a + 1));
  let h = d;
  for (let m = 1; m < 1000; m += 1) {
    const even = (m * (b - m) * x) / ((a + 2 * m - 1) * (a + 2 * m));
    d = 1 / (1 + even * d);
    c = 1 + even / c;
    h *= d * c;
    const odd = (-(a + m) * (a + b + m) * x) / ((a + 2 * m) * (a + 2 * m + 1));
    d = 1 / (1 + odd * d);
    c = 1 + odd / c;
    h *= d * c;
    if (Math.abs(d * c - 1) < 1e-16) break;
  }
  return (front * h) / a;
}

/** Share of Student's t above t: the one-sided p of a test. @param {{t: number, df: number}} of */
export function tAbove({ t, df }) {
  const freedom = needAboveZero('df', df);
  const value = needNumber('t', t);
  const tail = beta(freedom / (freedom + value * value), freedom / 2, 0.5) / 2;
  return value >= 0 ? tail : 1 - tail;
}

/**
 * Value below which a share of Student's t lies, by halving and Newton's steps.
 * One-sided alpha 0.10 asks for the share 0.90, not 0.95.
 *
 * @param {{share: number, df: number}} of
 */
export function tQuantile({ share, df }) {
  const below = needOpenShare('share', share);
  const freedom = needAboveZero('df', df);
  if (below === 0.5) return 0;
  if (below < 0.5) return -tQuantile({ share: 1 - below, df });
  let low = 0;
  let high = 2;
  while (tAbove({ t: high, df: freedom }) > 1 - below) high *= 2;
  for (let i = 0; i < 200 && high - low > 1e-15 * high; i += 1) {
    const middle = (low + high) / 2;
    if (tAbove({ t: middle, df: freedom }) > 1 - below) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}

/** Double sampling: many plots estimated by eye, some clipped to correct the eye (Cochran 1977). */
import { tQuantile } from './quantiles.js';
import { needAboveZero, needNotNegative, needOpenShare, needSameLength, refuse, sum } from './refusal.js';

/** Clipped over estimated, sum over sum. @param {{estimated: number[], clipped: number[]}} of */
export function correctionRatio({ estimated, clipped }) {
  needSameLength('estimated', estimated, 'clipped', clipped);
  if (!estimated.length) refuse('no_plots');
  const byEye = sum(estimated.map((value) => needNotNegative('estimated', value)));
  const cut = sum(clipped.map((value) => needNotNegative('clipped', value)));
  return cut / needAboveZero('sum of estimated', byEye);
}

function pairs(estimated, clipped, others, least) {
  needSameLength('estimated', estimated, 'clipped', clipped);
  const x = estimated.map((value) => needNotNegative('estimated', value));
  const y = clipped.map((value) => needNotNegative('clipped', value));
  if (x.length < least) refuse(x.length ? 'one_plot' : 'no_plots', x.length ? { least } : {});
  const rest = others.map((value) => needNotNegative('estimated', value));
  return { x, y, meanAll: (sum(x) + sum(rest)) / (x.length + rest.length) };
}

function squareSum(values) {
  const mean = sum(values) / values.length;
  return sum(values.map((value) => (value - mean) ** 2));
}

function withInterval(mean, se, df, confidence, slope) {
  const tail = (1 - needOpenShare('confidence', confidence)) / 2;
  const reach = tQuantile({ share: 1 - tail, df }) * se;
  return { mean, se, low: mean - reach, high: mean + reach, slope };
}

/**
 * Mean of all plots by the ratio of sums. At least 2 clipped plots.
 * @param {{estimated: number[], clipped: number[], others: number[], confidence: number}} of
 */
export function ratioEstimate({ estimated, clipped, others, confidence }) {
  const { x, y, meanAll } = pairs(estimated, clipped, others, 2);
  const ratio = correctionRatio({ estimated: x, clipped: y });
  const n = x.length;
  const sD = sum(x.map((value, i) => (y[i] - ratio * value) ** 2)) / (n - 1);
  const sY = squareSum(y) / (n - 1);
  const se = Math.sqrt(sD / n + Math.max(0, sY - sD) / (n + others.length));
  return withInterval(ratio * meanAll, se, n - 1, confidence, ratio);
}

/**
 * Mean of all plots by the line through the clipped ones. At least 3 clipped plots.
 * @param {{estimated: number[], clipped: number[], others: number[], confidence: number}} of
 */
export function regressionEstimate({ estimated, clipped, others, confidence }) {
  const { x, y, meanAll } = pairs(estimated, clipped, others, 3);
  const n = x.length;
  const meanX = sum(x) / n;
  const meanY = sum(y) / n;
  const sXX = squareSum(x);
  if (sXX === 0) refuse('no_spread');
  const slope = sum(x.map((value, i) => (value - meanX) * (y[i] - meanY))) / sXX;
  const s = sum(x.map((value, i) => (y[i] - meanY - slope * (value - meanX)) ** 2)) / (n - 2);
  const sY = squareSum(y) / (n - 1);
  const shift = meanAll - meanX;
  const variance = s * (1 / n + (shift * shift) / sXX) + Math.max(0, sY - s) / (n + others.length);
  return withInterval(meanY + slope * shift, Math.sqrt(variance), n - 2, confidence, slope);
}

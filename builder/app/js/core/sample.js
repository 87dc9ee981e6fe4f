/** A handful of plots: mean, spread, interval, and how many would be enough. */
import { tQuantile } from './quantiles.js';
import { needCount, needNotNegative, needNumber, needOpenShare, refuse, sum } from './refusal.js';

const MOST_PLOTS = 100000;

/**
 * Count, mean, standard deviation (n - 1) and standard error s / sqrt(n).
 * @param {{values: number[]}} of
 */
export function summary({ values }) {
  if (!values.length) refuse('no_plots');
  const numbers = values.map((value) => needNumber('plot', value));
  const n = numbers.length;
  if (n < 2) refuse('one_plot', { least: 2 });
  const mean = sum(numbers) / n;
  const sd = Math.sqrt(sum(numbers.map((value) => (value - mean) ** 2)) / (n - 1));
  return { n, mean, sd, se: sd / Math.sqrt(n) };
}

/** Two-sided interval of the mean. @param {{values: number[], confidence: number}} of */
export function meanInterval({ values, confidence }) {
  const plots = summary({ values });
  const tail = (1 - needOpenShare('confidence', confidence)) / 2;
  const reach = tQuantile({ share: 1 - tail, df: plots.n - 1 }) * plots.se;
  return [plots.mean - reach, plots.mean + reach];
}

function tOf(alpha, two_sided, df) {
  const tail = needOpenShare('alpha', alpha) / (two_sided ? 2 : 1);
  return tQuantile({ share: 1 - tail, df });
}

/**
 * Sample adequacy (t s / (precision mean))^2, t by the plots already taken. [plots]
 * @param {{n: number, mean: number, sd: number, precision: number, alpha: number, two_sided?: boolean}} of
 */
export function plotsForPrecision({ n, mean, sd, precision, alpha, two_sided = false }) {
  if (needCount('n', n) < 2) refuse('one_plot', { least: 2 });
  const reach = needOpenShare('precision', precision) * needNumber('mean', mean);
  if (reach === 0) refuse('zero_mean');
  return ((tOf(alpha, two_sided, n - 1) * needNotNegative('sd', sd)) / reach) ** 2;
}

/**
 * Plots to see a shortfall below a line with power 1 - beta. [plots]
 * @param {{n: number, sd: number, precision: number, line: number, alpha: number, beta: number}} of
 */
export function plotsForPower({ n, sd, precision, line, alpha, beta }) {
  if (needCount('n', n) < 2) refuse('one_plot', { least: 2 });
  const reach = needOpenShare('precision', precision) * needNumber('line', line);
  if (reach === 0) refuse('zero_mean');
  const both = tOf(alpha, false, n - 1) + tOf(beta, false, n - 1);
  return ((both * needNotNegative('sd', sd)) / reach) ** 2;
}

/**
 * Fewest plots whose own two-sided interval is narrow enough; t belongs to the answer. [plots]
 * @param {{mean: number, sd: number, precision: number, confidence: number}} of
 */
export function plotsInAll({ mean, sd, precision, confidence }) {
  const reach = needOpenShare('precision', precision) * Math.abs(needNumber('mean', mean));
  if (reach === 0) refuse('zero_mean');
  const spread = needNotNegative('sd', sd);
  const share = 1 - (1 - needOpenShare('confidence', confidence)) / 2;
  const wide = (n) => tQuantile({ share, df: n - 1 }) * spread > reach * Math.sqrt(n);
  let tooFew = 1;
  let enough = 2;
  while (wide(enough)) {
    tooFew = enough;
    enough *= 2;
    if (enough > MOST_PLOTS) refuse('more_than_all', { field: 'plots', value: enough, limit: MOST_PLOTS });
  }
  while (enough - tooFew > 1) {
    const middle = Math.floor((tooFew + enough) / 2);
    if (wide(middle)) tooFew = middle;
    else enough = middle;
  }
  return enough;
}

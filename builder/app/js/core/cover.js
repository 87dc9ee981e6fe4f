/** Cover: classes, midpoints, points, Wilson bounds, likeness and what was missed. */
import { normalQuantile } from './quantiles.js';
import { needCount, needNotNegative, needOpenShare, needPercent, needShare, refuse, sum } from './refusal.js';

/**
 * Code of the class that holds a cover; null for none. The lower limit belongs to the class.
 * @param {{cover_pct: number, classes: {code: string, low_pct: number}[]}} of
 */
export function classOf({ cover_pct, classes }) {
  const cover = needPercent('cover_pct', cover_pct);
  if (cover === 0) return null;
  let best = null;
  for (const row of classes) {
    if (row.low_pct <= cover && (!best || row.low_pct > best.low_pct)) best = row;
  }
  return best ? best.code : refuse('class_missing', { value: cover_pct });
}

/** Midpoint of a class. [%] @param {{code: string, classes: {code: string, mid_pct: number}[]}} of */
export function midPct({ code, classes }) {
  const row = classes.find((each) => each.code === code);
  return row ? row.mid_pct : refuse('class_missing', { value: code });
}

/** Mean cover over all plots; null is a plot without it. @param {{codes: (string|null)[], classes: object[]}} of */
export function meanCoverPct({ codes, classes }) {
  if (!codes.length) refuse('no_plots');
  return sum(codes.map((code) => (code === null ? 0 : midPct({ code, classes })))) / codes.length;
}

/** Share of plots that hold the plant. @param {{codes: (string|null)[]}} of */
export function frequency({ codes }) {
  if (!codes.length) refuse('no_plots');
  return codes.filter((code) => code !== null).length / codes.length;
}

/** Class of a constancy by upper limits; null if never met. @param {{constancy_pct: number, classes: object[]}} of */
export function constancyClass({ constancy_pct, classes }) {
  const constancy = needPercent('constancy_pct', constancy_pct);
  if (constancy === 0) return null;
  const row = classes.find(({ high_pct }) => constancy <= high_pct);
  return row ? row.code : refuse('class_missing', { value: constancy_pct });
}

/** One-sided Wilson bound. @param {{successes: number, n: number, confidence: number, upper: boolean}} of */
export function wilsonBound({ successes, n, confidence, upper }) {
  const hits = needCount('successes', successes);
  const plots = needCount('n', n);
  if (plots === 0) refuse('no_plots');
  if (hits > plots) refuse('more_than_all', { field: 'successes', value: hits, limit: plots });
  const z = normalQuantile({ share: needOpenShare('confidence', confidence) });
  if (upper ? hits === plots : hits === 0) return upper ? 1 : 0;
  const share = hits / plots;
  const middle = share + (z * z) / (2 * plots);
  const reach = z * Math.sqrt((share * (1 - share)) / plots + (z * z) / (4 * plots * plots));
  return (middle + (upper ? reach : -reach)) / (1 + (z * z) / plots);
}

/** Two-sided Wilson interval. @param {{successes: number, n: number, confidence: number}} of */
export function wilsonInterval({ successes, n, confidence }) {
  const beside = 1 - (1 - needOpenShare('confidence', confidence)) / 2;
  return [false, true].map((upper) => wilsonBound({ successes, n, confidence: beside, upper }));
}

/**
 * Cover from points: {name: [share, low, high]} by what was hit.
 * @param {{counts: Record<string, number>, confidence: number}} of
 */
export function pointShares({ counts, confidence }) {
  const total = sum(Object.entries(counts).map(([name, count]) => needCount(name, count)));
  if (total === 0) refuse('no_points');
  return Object.fromEntries(Object.entries(counts).map(([name, count]) =>
    [name, [count / total, ...wilsonInterval({ successes: count, n: total, confidence })]]));
}

/**
 * How much of a reference make-up stands here: sum of minima over its total.
 * @param {{present: Record<string, number>, reference: Record<string, number>}} of
 */
export function likeness({ present, reference }) {
  const wanted = Object.entries(reference).map(([plant, amount]) => [plant, needNotNegative(plant, amount)]);
  for (const [plant, amount] of Object.entries(present)) needNotNegative(plant, amount);
  const total = sum(wanted.map(([, amount]) => amount));
  if (total === 0) refuse('not_above_zero', { field: 'reference', value: total });
  return sum(wanted.map(([plant, amount]) => Math.min(present[plant] ?? 0, amount))) / total;
}

/** Chance not to record a plant of the zone in one searched plot. @param {{constancy: number, overlooked: number}} of */
export function chanceOfMiss({ constancy, overlooked }) {
  return 1 - needShare('constancy', constancy) * (1 - needShare('overlooked', overlooked));
}

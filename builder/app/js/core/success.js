/**
 * Has the stand met its standard? The direct null holds it good until the plots show it is
 * not, the reverse null wanting until they show it is good. The share applies once.
 */
import { wilsonBound } from './cover.js';
import { tAbove, tQuantile } from './quantiles.js';
import {
  needAboveZero, needCount, needNotNegative, needOpenShare, needSameLength, needShare, needSomeShare, refuse, sum,
} from './refusal.js';
import { summary } from './sample.js';

function isReverse(null_kind) {
  if (null_kind !== 'direct' && null_kind !== 'reverse') {
    refuse('unknown_choice', { field: 'null_kind', value: null_kind });
  }
  return null_kind === 'reverse';
}

function decide(mean, line, se, df, alpha, reverse) {
  const t_critical = tQuantile({ share: 1 - alpha, df });
  const bound = reverse ? mean - t_critical * se : mean + t_critical * se;
  if (se === 0) return { mean, line, df, t: null, t_critical, p: null, bound, passes: mean >= line };
  const t = (reverse ? mean - line : line - mean) / se;
  const passes = reverse ? t > t_critical : t <= t_critical;
  return { mean, line, df, t, t_critical, p: tAbove({ t, df }), bound, passes };
}

/**
 * The value a stand is held against.
 * @param {{standard: number, share: number, share_already_taken?: boolean}} of
 */
export function standardLine({ standard, share, share_already_taken = false }) {
  const part = needSomeShare('share', share);
  if (share_already_taken && part < 1) refuse('double_allowance', { value: share });
  return needNotNegative('standard', standard) * part;
}

/**
 * A trajectory's line in a year: straight between its points, flat after the last; null before.
 * @param {{points: [number, number][], year: number}} of
 */
export function lineAt({ points, year }) {
  const at = needNotNegative('year', year);
  if (!points.length || at < points[0][0]) return null;
  for (let i = 1; i < points.length; i += 1) {
    const [start, low] = points[i - 1];
    const [end, high] = points[i];
    if (at <= end) return low + ((high - low) * (at - start)) / (end - start);
  }
  return points[points.length - 1][1];
}

/**
 * One-sided t test against a line; at_most where less is better.
 * @param {{values: number[], line: number, alpha: number, null_kind: string, at_most?: boolean}} of
 */
export function oneSample({ values, line, alpha, null_kind, at_most = false }) {
  const plots = summary({ values });
  const risk = needOpenShare('alpha', alpha);
  const level = needNotNegative('line', line);
  const way = at_most ? -1 : 1;
  const test = decide(way * plots.mean, way * level, plots.se, plots.n - 1, risk, isReverse(null_kind));
  return { ...test, mean: plots.mean, line: level, bound: way * test.bound };
}

/**
 * One-sided Welch test against a share of a reference area.
 * @param {{values: number[], reference: number[], share: number, alpha: number, null_kind: string}} of
 */
export function twoSample({ values, reference, share, alpha, null_kind }) {
  const part = needSomeShare('share', share);
  const ours = summary({ values });
  const theirs = summary({ values: reference.map((value) => value * part) });
  const one = ours.se ** 2;
  const other = theirs.se ** 2;
  const spread = one + other;
  const df = spread === 0
    ? ours.n + theirs.n - 2
    : spread ** 2 / (one ** 2 / (ours.n - 1) + other ** 2 / (theirs.n - 1));
  const risk = needOpenShare('alpha', alpha);
  const gap = decide(ours.mean - theirs.mean, 0, Math.sqrt(spread), df, risk, isReverse(null_kind));
  return { ...gap, mean: ours.mean, line: theirs.mean, bound: gap.bound + theirs.mean };
}

/**
 * A counted share against a line by Wilson's bound: [share, bound, passes].
 * @param {{successes: number, n: number, line: number, alpha: number, null_kind: string}} of
 */
export function proportion({ successes, n, line, alpha, null_kind }) {
  const reverse = isReverse(null_kind);
  const wanted = needShare('line', line);
  const confidence = 1 - needOpenShare('alpha', alpha);
  const bound = wilsonBound({ successes, n, confidence, upper: !reverse });
  return [successes / n, bound, reverse ? bound > wanted : bound >= wanted];
}

/**
 * "met", "not_shown" or "too_few".
 * @param {{passes: boolean, n: number, needed: number, least: number, null_kind: string}} of
 */
export function verdict({ passes, n, needed, least, null_kind }) {
  const reverse = isReverse(null_kind);
  const short = needCount('n', n) < needNotNegative('needed', needed);
  if (n < needCount('least', least) || (short && !(reverse && passes))) return 'too_few';
  return passes ? 'met' : 'not_shown';
}

/**
 * Full years after the last seeding before a test counts; the break itself is dry.
 * @param {{rain_mm: number, rain_break_mm: number, years_wet: number, years_dry: number}} of
 */
export function responsibilityYears({ rain_mm, rain_break_mm, years_wet, years_dry }) {
  const wet = needNotNegative('rain_mm', rain_mm) > needAboveZero('rain_break_mm', rain_break_mm);
  const [wetWait, dryWait] = [needCount('years_wet', years_wet), needCount('years_dry', years_dry)];
  return wet ? wetWait : dryWait;
}

/** Standard of several reference areas by their ground. @param {{values: number[], weights: number[]}} of */
export function weightedStandard({ values, weights }) {
  needSameLength('values', values, 'weights', weights);
  const total = sum(weights.map((weight) => needShare('weight', weight)));
  if (Math.abs(total - 1) > 1e-3) refuse('shares_sum', { field: 'weights', value: total });
  return sum(values.map((value, i) => needNotNegative('value', value) * weights[i]));
}

/** A success test as it is signed: the null that decides, the other beside it, and why not yet. */
import { needNotNegative, needNumber, refuse } from './refusal.js';
import { plotsForPrecision, summary } from './sample.js';
import { lineAt, oneSample, responsibilityYears, standardLine, twoSample, verdict } from './success.js';

const NULLS = ['direct', 'reverse'];

function shareOf(region, zone, measure, against) {
  const usual = region.share ?? 1;
  const line = zone.perennial_cover_share_of_reference ?? null;
  if (measure !== 'cover' || against !== 'reference' || line === null) return usual;
  return line * (zone.share ?? usual);
}

/**
 * The rule a unit is tested by, from the region's success_rule, the zone's success and its
 * yearly rain. Cover against a reference takes the zone's own share of the reference.
 * @param {{region: object, zone: object, rain_mm: number | null, measure?: string, against?: string}} of
 */
export function ruleOf({ region, zone, rain_mm, measure = 'cover', against = 'reference' }) {
  const { reverse_null: reverse, sample_adequacy: adequacy, null_kind, alpha } = region;
  let years = zone.earliest_year ?? null;
  if ((region.rain_break_mm ?? null) !== null) {
    const rain = needNotNegative('rain_mm', rain_mm);
    years = Math.max(responsibilityYears({ ...region, rain_mm: rain }), years ?? 0);
  }
  return {
    null_kind,
    share: shareOf(region, zone, measure, against),
    alpha_direct: alpha,
    alpha_reverse: reverse ? reverse.alpha : alpha,
    precision: adequacy ? adequacy.d : 0.1,
    least: reverse && null_kind === 'reverse' ? Math.max(2, reverse.min_samples) : 2,
    years,
  };
}

function testOf(values, null_kind, rule, standard, reference, share_already_taken) {
  const alpha = rule[`alpha_${null_kind}`];
  const line = standardLine({ standard: standard ?? 1, share: rule.share, share_already_taken });
  if (standard !== null) return oneSample({ values, line, alpha, null_kind });
  return twoSample({ values, reference, share: rule.share, alpha, null_kind });
}

function neededOf(values, rule) {
  const { n, mean, sd } = summary({ values });
  if (mean === 0) return Math.max(2, rule.least);
  const alpha = rule[`alpha_${rule.null_kind}`];
  return Math.max(2, Math.ceil(plotsForPrecision({ n, mean, sd, precision: rule.precision, alpha })));
}

/**
 * Test plots of a unit against a standard or the plots of a reference area. `sentence` is a
 * word key: success.<null_kind>.<verdict> or success.too_soon. Rule as in
 * builder/formulas/success_test.py; it comes in the pack.
 *
 * @param {{values: number[], rule: object, standard?: number | null, reference?: number[] | null,
 *   share_already_taken?: boolean, years_since?: number | null}} of
 */
export function successTest({
  values, rule, standard = null, reference = null, share_already_taken = false, years_since = null,
}) {
  if ((standard === null) === (reference === null)) refuse('one_standard');
  if (standard !== null) needNotNegative('standard', standard);
  for (const value of [...values, ...(reference ?? [])]) needNumber('plot', value);
  const { null_kind } = rule;
  if (!NULLS.includes(null_kind)) refuse('unknown_choice', { field: 'null_kind', value: null_kind });
  const nothing = { null_kind, deciding: null, other: null, plots_needed: null };
  const wait = rule.years ?? null;
  if (wait !== null && needNotNegative('years_since', years_since) < wait) {
    return { verdict: 'too_soon', ...nothing, more: 0, sentence: 'success.too_soon' };
  }
  if (values.length < 2) {
    const more = Math.max(2, rule.least) - values.length;
    return { verdict: 'too_few', ...nothing, more, sentence: `success.${null_kind}.too_few` };
  }
  const [direct, reverse] = NULLS.map((each) =>
    testOf(values, each, rule, standard, reference, share_already_taken),
  );
  const [deciding, other] = null_kind === 'direct' ? [direct, reverse] : [reverse, direct];
  const plots_needed = neededOf(values, rule);
  const n = values.length;
  const answer = verdict({ passes: deciding.passes, n, needed: plots_needed, least: rule.least, null_kind });
  const more = answer === 'too_few' ? Math.max(0, Math.max(plots_needed, rule.least) - n) : 0;
  return { verdict: answer, null_kind, deciding, other, plots_needed, more, sentence: `success.${null_kind}.${answer}` };
}

/**
 * Every line of a zone's trajectory in one year after the work: {measure, verdict, line, at_most,
 * test}; verdict on_course, off_course, not_asked (no line yet) or too_few.
 *
 * @param {{lines: {measure: string, at_most?: [number, number][], at_least?: [number, number][]}[],
 *   plots: Record<string, number[]>, year: number, rule: object}} of
 */
export function trajectoryCheck({ lines, plots, year, rule }) {
  return lines.map(({ measure, at_most: ceiling = [], at_least: floor = [] }) => {
    const at_most = ceiling.length > 0;
    const line = lineAt({ points: at_most ? ceiling : floor, year });
    const values = plots[measure] ?? [];
    if (line === null) return { measure, verdict: 'not_asked', line, at_most, test: null };
    if (values.length < Math.max(2, rule.least)) return { measure, verdict: 'too_few', line, at_most, test: null };
    const { null_kind } = rule;
    const test = oneSample({ values, line, alpha: rule[`alpha_${null_kind}`], null_kind, at_most });
    return { measure, verdict: test.passes ? 'on_course' : 'off_course', line, at_most, test };
  });
}

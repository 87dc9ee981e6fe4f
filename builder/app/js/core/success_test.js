/** A success test as it is signed: the null that decides, the other beside it, and why not yet. */
import { needNotNegative, refuse } from './refusal.js';
import { plotsForPrecision, summary } from './sample.js';
import { oneSample, standardLine, twoSample, verdict } from './success.js';

const NULLS = ['direct', 'reverse'];

function testOf(values, kind, rule, standard, reference, share_already_taken) {
  const alpha = rule[`alpha_${kind}`];
  const line = standardLine({ standard: standard ?? 1, share: rule.share, share_already_taken });
  if (standard !== null) return oneSample({ values, line, alpha, null: kind });
  return twoSample({ values, reference, share: rule.share, alpha, null: kind });
}

function neededOf(values, rule) {
  const { n, mean, sd } = summary({ values });
  if (mean === 0) return Math.max(2, rule.least);
  const alpha = rule[`alpha_${rule.null}`];
  return Math.max(2, Math.ceil(plotsForPrecision({ n, mean, sd, precision: rule.precision, alpha })));
}

/**
 * Test plots of a unit against a standard or the plots of a reference area. `sentence` is a
 * word key: success.<null>.<verdict> or success.too_soon. Rule as in
 * builder/formulas/success_test.py; it comes in the pack.
 *
 * @param {{values: number[], rule: object, standard?: number | null, reference?: number[] | null,
 *   share_already_taken?: boolean, years_since?: number | null}} of
 */
export function successTest({
  values, rule, standard = null, reference = null, share_already_taken = false, years_since = null,
}) {
  if ((standard === null) === (reference === null)) refuse('one_standard');
  const kind = rule.null;
  if (!NULLS.includes(kind)) refuse('unknown_choice', { field: 'null', value: kind });
  const nothing = { null: kind, deciding: null, other: null, plots_needed: null };
  const wait = rule.years ?? null;
  if (wait !== null && needNotNegative('years_since', years_since) < wait) {
    return { verdict: 'too_soon', ...nothing, more: 0, sentence: 'success.too_soon' };
  }
  if (values.length < 2) {
    const more = Math.max(2, rule.least) - values.length;
    return { verdict: 'too_few', ...nothing, more, sentence: `success.${kind}.too_few` };
  }
  const [direct, reverse] = NULLS.map((each) =>
    testOf(values, each, rule, standard, reference, share_already_taken),
  );
  const [deciding, other] = kind === 'direct' ? [direct, reverse] : [reverse, direct];
  const plots_needed = neededOf(values, rule);
  const n = values.length;
  const answer = verdict({ passes: deciding.passes, n, needed: plots_needed, least: rule.least, null: kind });
  const more = answer === 'too_few' ? Math.max(0, Math.max(plots_needed, rule.least) - n) : 0;
  return { verdict: answer, null: kind, deciding, other, plots_needed, more, sentence: `success.${kind}.${answer}` };
}

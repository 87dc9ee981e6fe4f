/** The clip sheet as it is filled: running mean, interval, and how many more plots. */
import { clipKgHa } from './clipping.js';
import { ratioEstimate, regressionEstimate } from './double_sampling.js';
import { needNotNegative, needOpenShare, sum } from './refusal.js';
import { meanInterval, plotsInAll, summary } from './sample.js';

/**
 * A sheet of clipped plots so far. `more` is what is still to clip: up to two before a spread
 * can be seen, then as many as the spread so far asks for.
 *
 * @param {{green_g: number[], plot_m2: number, air_dry_share: number, precision: number, confidence: number}} of
 */
export function clipSheet({ green_g, plot_m2, air_dry_share, precision, confidence }) {
  needOpenShare('precision', precision);
  needOpenShare('confidence', confidence);
  clipKgHa({ green_g: 0, plot_m2, air_dry_share });
  const kg_ha = green_g.map((weight) => clipKgHa({ green_g: weight, plot_m2, air_dry_share }));
  const running_kg_ha = kg_ha.map((_, i) => sum(kg_ha.slice(0, i + 1)) / (i + 1));
  const sheet = { kg_ha, running_kg_ha, mean_kg_ha: running_kg_ha[0] ?? null, low_kg_ha: null, high_kg_ha: null };
  if (kg_ha.length < 2) return { ...sheet, plots_needed: null, more: 2 - kg_ha.length };
  const { n, mean, sd } = summary({ values: kg_ha });
  const [low_kg_ha, high_kg_ha] = meanInterval({ values: kg_ha, confidence });
  const plots_needed = mean ? plotsInAll({ mean, sd, precision, confidence }) : null;
  const more = plots_needed ? Math.max(0, plots_needed - n) : 0;
  return { kg_ha, running_kg_ha, mean_kg_ha: mean, low_kg_ha, high_kg_ha, plots_needed, more };
}

/**
 * A sheet of plots estimated by eye, some of them clipped. [kg ha-1]
 * @param {{rows: {estimated_g: number, clipped_g?: number | null}[], plot_m2: number,
 *   air_dry_share: number, confidence: number}} of
 */
export function doubleSheet({ rows, plot_m2, air_dry_share, confidence }) {
  needOpenShare('confidence', confidence);
  for (const { estimated_g } of rows) needNotNegative('estimated_g', estimated_g);
  const both = rows.filter(({ clipped_g }) => clipped_g !== null && clipped_g !== undefined);
  const estimated = both.map((row) => row.estimated_g);
  const clipped = both.map((row) => row.clipped_g);
  const others = rows.filter((row) => !both.includes(row)).map((row) => row.estimated_g);
  const factor = clipKgHa({ green_g: 1, plot_m2, air_dry_share });
  const inKgHa = ({ mean, se, low, high, slope }) => ({
    mean: mean * factor, se: se * factor, low: low * factor, high: high * factor, slope,
  });
  const of = { estimated, clipped, others, confidence };
  const spread = estimated.some((value) => value !== estimated[0]);
  return {
    n_estimated: rows.length,
    n_clipped: clipped.length,
    ratio: clipped.length >= 2 && sum(estimated) > 0 ? inKgHa(ratioEstimate(of)) : null,
    regression: clipped.length >= 3 && spread ? inKgHa(regressionEstimate(of)) : null,
  };
}

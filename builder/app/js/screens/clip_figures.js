/** The clip sheet's arithmetic put together from the record: no page in here. */
import { clipKgHa, reconstructedKgHa } from '../core/clipping.js';
import { clipSheet, doubleSheet } from '../core/clip_sheet.js';
import { region } from './state.js';

/** Precision and confidence wanted: the person's, else the region's own rule for enough plots. */
export function aims(production) {
  const rule = region.value.pack.success_rule ?? {};
  return {
    precision: production.precision ?? rule.sample_adequacy?.d ?? rule.precision,
    confidence: production.confidence ?? 1 - (rule.alpha ?? rule.alpha_direct),
  };
}

/** @param {object} production  @returns {{mean: number|null, take: number|null, plots: number, more: number, precision: number, kg_ha: (number|null)[]}|null} null while no plot is entered */
export function sheetOf(production) {
  const rows = (production.plots ?? []).filter((row) => row.clipped_g != null || row.estimated_g != null);
  if (rows.length === 0 || !(production.plot_m2 > 0)) return null;
  const { precision, confidence } = aims(production);
  const air_dry_share = production.air_dry_share ?? 1;
  const grown = (kg_ha) => reconstructedKgHa({ now_kg_ha: kg_ha, ungrazed_share: production.ungrazed_share ?? 1, growth_done_share: production.growth_done_share ?? 1 });
  const kg_ha = rows.map((row) => grown(clipKgHa({ green_g: row.clipped_g ?? row.estimated_g, plot_m2: production.plot_m2, air_dry_share })));
  const whole = { plots: rows.length, precision, kg_ha };
  if (rows.every((row) => row.clipped_g != null)) {
    const sheet = clipSheet({ green_g: rows.map((row) => row.clipped_g), plot_m2: production.plot_m2, air_dry_share, precision, confidence });
    const take = sheet.high_kg_ha === null ? null : grown((sheet.high_kg_ha - sheet.low_kg_ha) / 2);
    return { ...whole, mean: grown(sheet.mean_kg_ha), take, more: sheet.more };
  }
  const double = doubleSheet({ rows: rows.filter((row) => row.estimated_g != null), plot_m2: production.plot_m2, air_dry_share, confidence });
  const best = double.regression ?? double.ratio;
  if (!best) return { ...whole, mean: null, take: null, more: 2 - double.n_clipped };
  return { ...whole, mean: grown(best.mean), take: grown((best.high - best.low) / 2), more: 0 };
}

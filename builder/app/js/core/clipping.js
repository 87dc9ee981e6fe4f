/** From clipped grams to air-dry kilograms on a hectare, and back to a whole season. */
import { needAboveZero, needCount, needNotNegative, needSomeShare, refuse } from './refusal.js';

/** Kilograms on a hectare for one gram in the plot. @param {{plot_m2: number, summed?: number}} of */
export function plotFactorKgHa({ plot_m2, summed = 1 }) {
  if (needCount('summed', summed) < 1) refuse('no_plots');
  return 10 / (needAboveZero('plot_m2', plot_m2) * summed);
}

/** Pounds on an acre for one gram in the plot, unrounded. @param {{plot_ft2: number, summed?: number}} of */
export function plotFactorLbAcre({ plot_ft2, summed = 1 }) {
  if (needCount('summed', summed) < 1) refuse('no_plots');
  return 43560 / 453.59237 / (needAboveZero('plot_ft2', plot_ft2) * summed);
}

/**
 * Air-dry growth from a clipped plot. [kg ha-1]
 * @param {{green_g: number, plot_m2: number, air_dry_share?: number, summed?: number}} of
 */
export function clipKgHa({ green_g, plot_m2, air_dry_share = 1, summed = 1 }) {
  const green = needNotNegative('green_g', green_g);
  return green * needSomeShare('air_dry_share', air_dry_share) * plotFactorKgHa({ plot_m2, summed });
}

/** Inner diameter of a round plot. @param {{area: number}} of */
export function hoopDiameter({ area }) {
  return 2 * Math.sqrt(needAboveZero('area', area) / Math.PI);
}

/** Length of wire around a round plot. @param {{area: number}} of */
export function hoopLength({ area }) {
  return Math.PI * hoopDiameter({ area });
}

/** Air-dry share of a subsample weighed in its bag. @param {{bag_g: number, bag_and_green_g: number, bag_and_dry_g: number}} of */
export function airDryShare({ bag_g, bag_and_green_g, bag_and_dry_g }) {
  const bag = needNotNegative('bag_g', bag_g);
  const green = needAboveZero('green_g', needNotNegative('bag_and_green_g', bag_and_green_g) - bag);
  const dry = needNotNegative('dry_g', needNotNegative('bag_and_dry_g', bag_and_dry_g) - bag);
  if (dry > green) refuse('dry_over_green', { dry, green });
  return dry / green;
}

/**
 * Whole season's ungrazed growth from what stands now; all three adjustments divide.
 * @param {{now_kg_ha: number, ungrazed_share: number, growth_done_share: number, year_share?: number}} of
 */
export function reconstructedKgHa({ now_kg_ha, ungrazed_share, growth_done_share, year_share = 1 }) {
  const left = needSomeShare('ungrazed_share', ungrazed_share);
  const done = needSomeShare('growth_done_share', growth_done_share);
  const year = needAboveZero('year_share', year_share);
  return needNotNegative('now_kg_ha', now_kg_ha) / (left * done * year);
}

/** What the ground should yield this year, how sure that is, and where a measure falls. Air-dry. */
import { normalBelow, normalQuantile } from './quantiles.js';
import { needAboveZero, needNotNegative, needNumber, needOpenShare, needSameLength, refuse, sum } from './refusal.js';

const LEAST_SHARE = 0.1;
/** Shares of a zone's sites below the low and the high end of a range. */
export const RANGE_SHARES = [0.2, 0.8];
const RAIN_SOURCES = ['gauge', 'office', 'guess'];

/**
 * This year's growth over a normal year's: max(0.1, 1 + r (rain - 1) + w warmer).
 * @param {{rain_share: number, rain_response: number, warmer_c?: number, warmth_response_per_c?: number}} of
 */
export function yearShare({ rain_share, rain_response, warmer_c = 0, warmth_response_per_c = 0 }) {
  const rain = needNotNegative('rain_share', rain_share) - 1;
  let gain = needNumber('rain_response', rain_response) * rain;
  const warm = needNumber('warmer_c', warmer_c);
  gain += needNumber('warmth_response_per_c', warmth_response_per_c) * warm;
  return Math.max(LEAST_SHARE, 1 + gain);
}

const logSpread = (cv) => Math.sqrt(Math.log1p(needNotNegative('spread_cv', cv) ** 2));

/**
 * Range of a zone's sites in one year, lognormal about its median: [low, high]. [kg ha-1]
 * @param {{centre_kg_ha: number, spread_cv: number, low?: number, high?: number}} of
 */
export function yearRange({ centre_kg_ha, spread_cv, low = RANGE_SHARES[0], high = RANGE_SHARES[1] }) {
  const centre = needAboveZero('centre_kg_ha', centre_kg_ha);
  const spread = logSpread(spread_cv);
  return [low, high].map((share) => centre * Math.exp(normalQuantile({ share }) * spread));
}

/**
 * Quantile of growth when the zone itself is in doubt. [kg ha-1]
 * @param {{share: number, weights: number[], centres_kg_ha: number[], spread_cvs: number[]}} of
 */
export function mixtureQuantile({ share, weights, centres_kg_ha, spread_cvs }) {
  const wanted = needOpenShare('share', share);
  needSameLength('weights', weights, 'centres_kg_ha', centres_kg_ha);
  needSameLength('weights', weights, 'spread_cvs', spread_cvs);
  const parts = weights.map((weight, i) => ({
    weight: needNotNegative('weight', weight),
    middle: Math.log(needAboveZero('centre_kg_ha', centres_kg_ha[i])),
    spread: logSpread(needAboveZero('spread_cv', spread_cvs[i])),
  }));
  const total = sum(parts.map(({ weight }) => weight));
  if (total === 0) refuse('probabilities_empty');
  const z = normalQuantile({ share: wanted });
  const ends = parts.filter(({ weight }) => weight > 0).map(({ middle, spread }) => middle + z * spread);
  let low = Math.min(...ends);
  let high = Math.max(...ends);
  for (let i = 0; i < 200; i += 1) {
    const at = (low + high) / 2;
    const below = sum(parts.map((p) => p.weight * normalBelow({ z: (at - p.middle) / p.spread }))) / total;
    if (below < wanted) low = at;
    else high = at;
    if (high - low < 1e-14 * Math.max(1, Math.abs(high))) break;
  }
  return Math.exp((low + high) / 2);
}

/**
 * Where a measure falls: "under", "inside" or "over" the range; its ends are inside.
 * @param {{measured_kg_ha: number, low_kg_ha: number, high_kg_ha: number}} of
 */
export function placeOf({ measured_kg_ha, low_kg_ha, high_kg_ha }) {
  const measured = needNotNegative('measured_kg_ha', measured_kg_ha);
  const low = needNotNegative('low_kg_ha', low_kg_ha);
  if (needNotNegative('high_kg_ha', high_kg_ha) < low) {
    refuse('more_than_all', { field: 'low_kg_ha', value: low_kg_ha, limit: high_kg_ha });
  }
  if (measured < low) return 'under';
  return measured > high_kg_ha ? 'over' : 'inside';
}

/** Whether a place in the range is no test: rain guessed or unknown. @param {{rain_source: string | null}} of */
export function isProvisional({ rain_source }) {
  if (rain_source !== null && !RAIN_SOURCES.includes(rain_source)) {
    refuse('unknown_choice', { field: 'rain_source', value: rain_source });
  }
  return rain_source === null || rain_source === 'guess';
}

/** Seed: pure live seed, bulk, mixes by three different percents, and how it is sown. */
import {
  needAboveZero, needNotNegative, needSameLength, needShare, needSomeShare, refuse, sum,
} from './refusal.js';

const SLACK = 1e-9;

/**
 * Share of pure seed that is alive: germination with dormant seed, or tetrazolium in place.
 * @param {{germination: number, dormant?: number, tetrazolium?: number | null}} of
 */
export function viableShare({ germination, dormant = 0, tetrazolium = null }) {
  const sprouted = needShare('germination', germination);
  const resting = needShare('dormant', dormant);
  if (tetrazolium !== null) {
    if (resting) refuse('two_viabilities');
    return needShare('tetrazolium', tetrazolium);
  }
  const all = sprouted + resting;
  if (all > 1 + SLACK) refuse('germination_over_all', { value: Math.round(all * 1e4) / 1e4 });
  return Math.min(1, all);
}

/** Pure live share of a lot. @param {{purity: number, viable: number}} of */
export function plsShare({ purity, viable }) {
  return needSomeShare('purity', purity) * needSomeShare('viable', viable);
}

/** Bulk seed so that enough is alive. @param {{pls_kg: number, pls_share: number}} of */
export function bulkKg({ pls_kg, pls_share }) {
  return needNotNegative('pls_kg', pls_kg) / needSomeShare('pls_share', pls_share);
}

/** Pure live seed for live seeds on the ground. [kg ha-1] @param {{seeds_m2: number, seeds_per_g: number}} of */
export function plsKgHa({ seeds_m2, seeds_per_g }) {
  return (needNotNegative('seeds_m2', seeds_m2) * 10) / needAboveZero('seeds_per_g', seeds_per_g);
}

/** Live seeds on a square metre from a rate. @param {{pls_kg_ha: number, seeds_per_g: number}} of */
export function seedsM2({ pls_kg_ha, seeds_per_g }) {
  return (needNotNegative('pls_kg_ha', pls_kg_ha) * needAboveZero('seeds_per_g', seeds_per_g)) / 10;
}

/**
 * Bulk seed to buy for an area. [kg]
 * @param {{seeds_m2: number, seeds_per_g: number, pls_share: number, area_ha: number, method_factor?: number}} of
 */
export function orderBulkKg({ seeds_m2, seeds_per_g, pls_share, area_ha, method_factor = 1 }) {
  const rate = bulkKg({ pls_kg: plsKgHa({ seeds_m2, seeds_per_g }), pls_share });
  return rate * needAboveZero('area_ha', area_ha) * needAboveZero('method_factor', method_factor);
}

/**
 * What to multiply a mix's rates by when it is sown another way than they hold for.
 * @param {{base: string, wanted: string, factors: Record<string, number | null>}} of
 */
export function methodFactor({ base, wanted, factors }) {
  if (wanted === base) return 1;
  const [to, from] = [wanted, base].map((method) => {
    const factor = factors[method] ?? null;
    return factor === null ? refuse('method_not_usable', { value: method }) : needAboveZero('method_factor', factor);
  });
  return to / from;
}

function checkedShares(field, shares) {
  if (!shares.length) refuse('mix_empty');
  const total = sum(shares.map((share) => needShare(field, share)));
  if (Math.abs(total - 1) > 1e-6) refuse('shares_sum', { field, value: Math.round(total * 1e6) / 1e6 });
  return shares;
}

/**
 * Rates of a mix given as shares of SEEDS. [kg ha-1 PLS]
 * @param {{total_seeds_m2: number, seed_shares: number[], seeds_per_g: number[]}} of
 */
export function mixBySeedCount({ total_seeds_m2, seed_shares, seeds_per_g }) {
  needSameLength('seed_shares', seed_shares, 'seeds_per_g', seeds_per_g);
  const total = needAboveZero('total_seeds_m2', total_seeds_m2);
  return checkedShares('seed_shares', seed_shares).map((share, i) =>
    plsKgHa({ seeds_m2: total * share, seeds_per_g: seeds_per_g[i] }),
  );
}

/** Rates of a mix given as shares of WEIGHT. @param {{total_pls_kg_ha: number, weight_shares: number[]}} of */
export function mixByWeight({ total_pls_kg_ha, weight_shares }) {
  const total = needAboveZero('total_pls_kg_ha', total_pls_kg_ha);
  return checkedShares('weight_shares', weight_shares).map((share) => total * share);
}

/**
 * Rates of a mix given as shares of each plant's FULL-STAND rate.
 * @param {{stand_shares: number[], full_rates_kg_ha: number[]}} of
 */
export function mixByFullStand({ stand_shares, full_rates_kg_ha }) {
  needSameLength('stand_shares', stand_shares, 'full_rates_kg_ha', full_rates_kg_ha);
  const shares = checkedShares('stand_shares', stand_shares);
  return shares.map((share, i) => share * needAboveZero('full_rate_kg_ha', full_rates_kg_ha[i]));
}

/** Each plant's share of a total of seeds or of weight. @param {{amounts: number[]}} of */
export function amountShares({ amounts }) {
  const total = sum(amounts.map((amount) => needNotNegative('amount', amount)));
  if (total === 0) refuse('mix_empty');
  return amounts.map((amount) => amount / total);
}

function dateParts(field, text) {
  const parts = /^(\d{4})-(\d{2})-(\d{2})$/.exec(String(text))?.slice(1).map(Number);
  if (!parts) return refuse('date', { field, value: text });
  const [year, month, day] = parts;
  if (month < 1 || month > 12 || day < 1 || day > lastDay(year, month)) refuse('date', { field, value: text });
  return parts;
}

function lastDay(year, month) {
  const leap = (year % 4 === 0 && year % 100 !== 0) || year % 400 === 0;
  return [31, leap ? 29 : 28, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31][month - 1];
}

/** Whole months since a seed test. @param {{test_date: string, today: string}} of */
export function tagAgeMonths({ test_date, today }) {
  const [testYear, testMonth, testDay] = dateParts('test_date', test_date);
  const [year, month, day] = dateParts('today', today);
  if (String(test_date) > String(today)) refuse('future_date', { field: 'test_date', value: test_date });
  const months = (year - testYear) * 12 + month - testMonth;
  return months - (day < testDay && day !== lastDay(year, month) ? 1 : 0);
}

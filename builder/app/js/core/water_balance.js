/** Water in and out of the rooted ground by month: bucket, snow, dry and growing months. */
import { needAboveZero, needMonths, needNotNegative, needNumber, needShare, refuse } from './refusal.js';

const SETTLED_MM = 1e-9;
const MOST_YEARS = 500;

/** Water still held after a potential loss: C exp(-loss / C). @param {{capacity_mm: number, loss_mm: number}} of */
export function retainedMm({ capacity_mm, loss_mm }) {
  const capacity = needAboveZero('capacity_mm', capacity_mm);
  return capacity * Math.exp(-needNotNegative('loss_mm', loss_mm) / capacity);
}

function oneYear(water, demand, capacity, linear, start) {
  const year = { storage_mm: [], actual_mm: [], deficit_mm: [], surplus_mm: [] };
  let stored = start;
  water.forEach((supply, i) => {
    const wanted = demand[i];
    let actual = wanted;
    let level = stored + supply - wanted;
    if (supply < wanted) {
      const lack = wanted - supply;
      const drawn = linear ? Math.min(stored, lack) : stored * (1 - Math.exp(-lack / capacity));
      actual = supply + drawn;
      level = stored - drawn;
    }
    stored = Math.min(level, capacity);
    year.storage_mm.push(stored);
    year.actual_mm.push(actual);
    year.deficit_mm.push(wanted - actual);
    year.surplus_mm.push(Math.max(0, level - capacity));
  });
  return year;
}

/**
 * Monthly balance of a rooted layer, January first. [mm]
 * linear: plain bucket, else Thornthwaite & Mather; start: "equilibrium" or "full".
 *
 * @param {{water_mm: number[], demand_mm: number[], capacity_mm: number, linear?: boolean, start?: string}} of
 */
export function balance({ water_mm, demand_mm, capacity_mm, linear = false, start = 'equilibrium' }) {
  const water = needMonths('water_mm', water_mm).map((v) => needNotNegative('water_mm', v));
  const demand = needMonths('demand_mm', demand_mm).map((v) => needNotNegative('demand_mm', v));
  const capacity = needAboveZero('capacity_mm', capacity_mm);
  if (start !== 'equilibrium' && start !== 'full') refuse('unknown_choice', { field: 'start', value: start });
  let stored = capacity;
  let year = oneYear(water, demand, capacity, linear, stored);
  for (let i = 1; i < MOST_YEARS; i += 1) {
    if (start === 'full' || Math.abs(year.storage_mm[11] - stored) < SETTLED_MM) break;
    stored = year.storage_mm[11];
    year = oneYear(water, demand, capacity, linear, stored);
  }
  return year;
}

/**
 * Water that reaches the ground and snow lying at each month's end: [water, pack]. [mm]
 * @param {{rain_mm: number[], mean_c: number[], snow: {snow_c: number, rain_c: number, melt_c: number, melt_share: number}}} of
 */
export function snowMonths({ rain_mm, mean_c, snow }) {
  const rain = needMonths('rain_mm', rain_mm).map((v) => needNotNegative('rain_mm', v));
  const means = needMonths('mean_c', mean_c);
  const years = means.some((mean) => mean > snow.melt_c) ? MOST_YEARS : 1;
  const water = [];
  const packs = [];
  let lying = 0;
  for (let year = 0; year < years; year += 1) {
    const before = lying;
    rain.forEach((amount, month) => {
      const frozen = (snow.rain_c - means[month]) / (snow.rain_c - snow.snow_c);
      const snowfall = amount * Math.max(0, Math.min(1, frozen));
      const melt = (lying + snowfall) * (means[month] > snow.melt_c ? snow.melt_share : 0);
      lying += snowfall - melt;
      water[month] = amount - snowfall + melt;
      packs[month] = lying;
    });
    if (Math.abs(lying - before) < SETTLED_MM) break;
  }
  return [water, packs];
}

/** Months (1-12) with P < 2 T (or <= when not strict). @param {{rain_mm: number[], mean_c: number[], strict?: boolean}} of */
export function dryMonths({ rain_mm, mean_c, strict = true }) {
  const rain = needMonths('rain_mm', rain_mm);
  const means = needMonths('mean_c', mean_c);
  return rain.flatMap((amount, i) =>
    amount < 2 * means[i] || (!strict && amount === 2 * means[i]) ? [i + 1] : [],
  );
}

/**
 * Months (1-12) both warm and moist, with little snow left.
 * @param {{mean_c: number[], actual_mm: number[], potential_mm: number[], pack_mm: number[],
 *   warm_c: number, moist_share: number, snow_free_mm: number}} of
 */
export function growingMonths({ mean_c, actual_mm, potential_mm, pack_mm, warm_c, moist_share, snow_free_mm }) {
  const share = needShare('moist_share', moist_share);
  const warm = needNumber('warm_c', warm_c);
  const free = needNotNegative('snow_free_mm', snow_free_mm);
  const means = needMonths('mean_c', mean_c);
  const packs = needMonths('pack_mm', pack_mm);
  const used = needMonths('actual_mm', actual_mm);
  const wanted = needMonths('potential_mm', potential_mm);
  return means.flatMap((mean, i) =>
    mean >= warm && wanted[i] > 0 && used[i] >= share * wanted[i] && packs[i] < free ? [i + 1] : [],
  );
}

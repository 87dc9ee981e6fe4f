/** The year of one site: warmth, rain, evaporation, soil water, growing months, what limits. */
import { hargreavesMonthsMm, rainAtHeightMm, temperatureAtHeightC } from './climate.js';
import { needMonths, needNotNegative, needNumber, sum } from './refusal.js';
import { balance, dryMonths, growingMonths, snowMonths } from './water_balance.js';

/**
 * A zone's monthly normals carried to a site's height: [tmax, tmin, precip].
 * @param {{tmax_c: number[], tmin_c: number[], precip_mm: number[], from_m: number, to_m: number,
 *   tmax_c_per_km: number[], tmin_c_per_km: number[], rain_pct_per_km: number[]}} of
 */
export function carried({
  tmax_c, tmin_c, precip_mm, from_m, to_m, tmax_c_per_km, tmin_c_per_km, rain_pct_per_km,
}) {
  const highs = needMonths('tmax_c', tmax_c);
  const lows = needMonths('tmin_c', tmin_c);
  const rain = needMonths('precip_mm', precip_mm);
  const highChange = needMonths('tmax_c_per_km', tmax_c_per_km);
  const lowChange = needMonths('tmin_c_per_km', tmin_c_per_km);
  const rainChange = needMonths('rain_pct_per_km', rain_pct_per_km);
  const move = (temperature_c, change_c_per_km) =>
    temperatureAtHeightC({ temperature_c, from_m, to_m, change_c_per_km });
  const pairs = highs.map((high, i) => {
    const top = move(high, highChange[i]);
    const foot = move(lows[i], lowChange[i]);
    return top < foot ? [(top + foot) / 2, (top + foot) / 2] : [top, foot];
  });
  return [
    pairs.map(([top]) => top),
    pairs.map(([, foot]) => foot),
    rain.map((rain_mm, i) => rainAtHeightMm({ rain_mm, from_m, to_m, gain_per_km: rainChange[i] / 100 })),
  ];
}

/** Whether ground water feeds the roots. @param {{water_table_cm: number | null, near_water_cm: number}} of */
export function isFed({ water_table_cm, near_water_cm }) {
  const near = needNotNegative('near_water_cm', near_water_cm);
  return water_table_cm !== null && needNumber('water_table_cm', water_table_cm) <= near;
}

/**
 * Water and warmth of a site month by month. The rule comes in the pack: {warm_c, moist_share,
 * snow_free_mm, cool_share, near_water_cm, snow: {snow_c, rain_c, melt_c, melt_share}}.
 *
 * @param {{latitude_deg: number, tmax_c: number[], tmin_c: number[], precip_mm: number[],
 *   capacity_mm: number, water_table_cm?: number | null, rule: object}} of
 */
export function siteYear({ latitude_deg, tmax_c, tmin_c, precip_mm, capacity_mm, water_table_cm = null, rule }) {
  const highs = needMonths('tmax_c', tmax_c);
  const lows = needMonths('tmin_c', tmin_c);
  const rain_mm = needMonths('precip_mm', precip_mm);
  const mean_c = highs.map((high, i) => (high + lows[i]) / 2);
  const potential_mm = hargreavesMonthsMm({ latitude_deg, tmax_c: highs, tmin_c: lows });
  const wanted = potential_mm.map((amount, i) => amount * (mean_c[i] < rule.warm_c ? rule.cool_share : 1));
  const [water_mm, pack_mm] = snowMonths({ rain_mm, mean_c, snow: rule.snow });
  const months = balance({ water_mm, demand_mm: wanted, capacity_mm });
  const actual_mm = isFed({ water_table_cm, near_water_cm: rule.near_water_cm }) ? wanted : months.actual_mm;
  return {
    mean_c,
    rain_mm,
    potential_mm,
    actual_mm,
    storage_mm: months.storage_mm,
    deficit_mm: potential_mm.map((full, i) => full - actual_mm[i]),
    surplus_mm: months.surplus_mm,
    pack_mm,
    warm: mean_c.flatMap((mean, i) => (mean >= rule.warm_c ? [i + 1] : [])),
    growing: growingMonths({ mean_c, actual_mm, potential_mm, pack_mm, ...rule }),
    dry: dryMonths({ rain_mm, mean_c }),
  };
}

/**
 * What holds plants back on a site, the strongest first: [{key, values}]. The rule comes in the
 * pack: {near_water_cm, little_water_mm, unmet_share, short_season_months, wet_surplus_share}.
 *
 * @param {{year: ReturnType<typeof siteYear>, capacity_mm: number, water_table_cm?: number | null, rule: object}} of
 */
export function limits({ year, capacity_mm, water_table_cm = null, rule }) {
  const found = [];
  const fed = isFed({ water_table_cm, near_water_cm: rule.near_water_cm });
  if (fed) found.push({ key: 'wetness', values: { depth_cm: water_table_cm } });
  const over = (amounts) => sum(year.warm.map((month) => amounts[month - 1]));
  const wanted = over(year.potential_mm);
  const missing_mm = over(year.deficit_mm);
  const warm_months = year.warm.length;
  const dry_months = year.warm.filter(
    (month) => year.actual_mm[month - 1] < rule.moist_share * year.potential_mm[month - 1],
  ).length;
  const dry = wanted > 0 && (missing_mm / wanted >= rule.unmet_share || dry_months >= 2);
  if (dry && !fed) found.push({ key: 'water', values: { missing_mm, dry_months, warm_months } });
  if (warm_months <= rule.short_season_months) {
    found.push({ key: 'warmth', values: { warm_months, warmest_c: Math.max(...year.mean_c) } });
  }
  if (needNotNegative('capacity_mm', capacity_mm) < rule.little_water_mm && !fed) {
    found.push({ key: 'soil', values: { held_mm: capacity_mm } });
  }
  const surplus_mm = sum(year.surplus_mm);
  const rain_mm = sum(year.rain_mm);
  if (rain_mm > 0 && surplus_mm / rain_mm > rule.wet_surplus_share) {
    found.push({ key: 'surplus', values: { surplus_mm, rain_mm } });
  }
  return found;
}

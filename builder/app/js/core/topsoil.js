/** Topsoil by lift: volumes in the bank, loose and compacted, and what a ledger must warn of. */
import { needAboveZero, needNotNegative, needNumber, needShare, refuse, sum } from './refusal.js';

/** Volume of a lift as it lies. [m3] @param {{area_ha: number, depth_cm: number}} of */
export function bankM3({ area_ha, depth_cm }) {
  return (needAboveZero('area_ha', area_ha) * 10000 * needAboveZero('depth_cm', depth_cm)) / 100;
}

/** Volume once dug. @param {{bank_m3: number, swell_share: number}} of */
export function looseM3({ bank_m3, swell_share }) {
  return needNotNegative('bank_m3', bank_m3) * (1 + needShare('swell_share', swell_share));
}

/** Volume as it lay, from the pile: a division. @param {{loose_m3: number, swell_share: number}} of */
export function bankOfLooseM3({ loose_m3, swell_share }) {
  return needNotNegative('loose_m3', loose_m3) / (1 + needShare('swell_share', swell_share));
}

/** Volume once placed and settled. @param {{bank_m3: number, shrink_share: number}} of */
export function compactedM3({ bank_m3, shrink_share }) {
  return needNotNegative('bank_m3', bank_m3) * (1 - needShare('shrink_share', shrink_share));
}

/** Volume to strip for a settled volume. @param {{compacted_m3: number, shrink_share: number}} of */
export function bankForCompactedM3({ compacted_m3, shrink_share }) {
  const kept = 1 - needShare('shrink_share', shrink_share);
  return needNotNegative('compacted_m3', compacted_m3) / needAboveZero('1 - shrink', kept);
}

const APART = [['ec_ds_m', 'keep_apart_salt'], ['stones_vol_pct', 'keep_apart_stones']];
const STORED = [['stored_months', 'pile_old'], ['pile_height_m', 'pile_high']];
const known = (value) => value !== null && value !== undefined;

function lineWarnings(lift, number, above, limits) {
  const found = [];
  for (const [field, key] of APART) {
    const [here, there] = [lift[field], above[field]];
    if (!known(here) || !known(there)) continue;
    if (needNumber(field, here) - needNumber(field, there) >= limits[field]) {
      found.push({ lift: number, key, values: { here, above: there } });
    }
  }
  for (const [field, key] of STORED) {
    const here = lift[field];
    if (known(here) && needNotNegative(field, here) > limits[field]) {
      found.push({ lift: number, key, values: { here, limit: limits[field] } });
    }
  }
  return found;
}

/**
 * Volumes of all lifts of a unit, the depth they give back, and warnings (word keys).
 * Limits come in the pack: ec_ds_m, stones_vol_pct, stored_months, pile_height_m.
 *
 * @param {{lifts: object[], swell_share: number, spread_ha: number | null, limits: Record<string, number>}} of
 */
export function ledger({ lifts, swell_share, spread_ha, limits }) {
  if (!lifts.length) refuse('layers_missing');
  const bank = lifts.map(bankM3);
  const loose = bank.map((bank_m3) => looseM3({ bank_m3, swell_share }));
  const back = spread_ha === null ? null : (sum(bank) / (needAboveZero('spread_ha', spread_ha) * 10000)) * 100;
  return {
    bank_m3: bank,
    loose_m3: loose,
    total_bank_m3: sum(bank),
    total_loose_m3: sum(loose),
    spread_depth_cm: back,
    warnings: lifts.flatMap((lift, i) => lineWarnings(lift, i, lifts[i - 1] ?? {}, limits)),
  };
}

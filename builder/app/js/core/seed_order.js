/**
 * The seed order sheet: lot tags in, kilograms out, and what must be refused or warned of.
 * Remarks are {level: "refuse" | "warn", key, values}; an order with a refusal may not print.
 */
import { needAboveZero, needCount, needShare } from './refusal.js';
import { bulkKg, methodFactor, plsKgHa, plsShare, tagAgeMonths, viableShare } from './seeding.js';

const remark = (level, key, values = {}) => ({ level, key, values });

function refusal(work) {
  try {
    return [work(), null];
  } catch (no) {
    if (no instanceof RangeError) return [null, no];
    throw no;
  }
}

function total(amounts) {
  const whole = amounts.length > 0 && amounts.every((amount) => amount !== null);
  return whole ? amounts.reduce((all, amount) => all + amount, 0) : null;
}

function season(sow_month, window_months) {
  if (!window_months.length) return [remark('warn', 'no_window')];
  if (window_months.includes(sow_month)) return [];
  return [remark('warn', 'out_of_season', { month: sow_month, months: [...window_months] })];
}

function nameAndOrigin(lot) {
  const found = [];
  if (lot.generic) found.push(remark('refuse', 'generic_name'));
  if (lot.noxious?.length) found.push(remark('refuse', 'noxious_seed', { names: [...lot.noxious] }));
  if (!lot.origin) found.push(remark('warn', 'origin_missing'));
  for (const field of ['weed_seed', 'other_crop']) {
    if (lot[field]) found.push(remark('warn', field, { share: needShare(field, lot[field]) }));
  }
  return found;
}

function age(lot, today, stale_months) {
  if (!lot.test_date) return [remark('refuse', 'test_date_missing')];
  const [months, no] = refusal(() => tagAgeMonths({ test_date: lot.test_date, today }));
  if (no) return [remark('refuse', 'tag_impossible', { because: no.message })];
  return months > stale_months ? [remark('refuse', 'tag_stale', { months, limit: stale_months })] : [];
}

function tagShare(lot) {
  const missing = (value) => value === null || value === undefined;
  if (missing(lot.purity)) return [null, [remark('refuse', 'tag_missing')]];
  if (missing(lot.germination) && missing(lot.tetrazolium)) {
    return [null, [remark('refuse', 'germination_missing')]];
  }
  const [share, no] = refusal(() => {
    const viable = viableShare({
      germination: lot.germination ?? 0,
      dormant: lot.dormant ?? 0,
      tetrazolium: lot.tetrazolium ?? null,
    });
    if (lot.purity + (lot.other_crop ?? 0) + (lot.weed_seed ?? 0) > 1 + 1e-9) {
      throw new RangeError('more_than_all');
    }
    return plsShare({ purity: lot.purity, viable });
  });
  return [share, no ? [remark('refuse', 'tag_impossible', { because: no.message })] : []];
}

function line(lot, area, factor, today, stale_months) {
  const remarks = [...nameAndOrigin(lot), ...age(lot, today, stale_months)];
  const [share, faults] = tagShare(lot);
  remarks.push(...faults);
  const nothing = { pls_share: share, pls_kg_ha: null, bulk_kg_ha: null, pls_kg: null, bulk_kg: null, remarks };
  if (factor === null) return nothing;
  const rate = plsKgHa(lot) * factor;
  if (share === null) return { ...nothing, pls_kg_ha: rate, pls_kg: rate * area };
  const bulk = bulkKg({ pls_kg: rate, pls_share: share });
  return { pls_share: share, pls_kg_ha: rate, bulk_kg_ha: bulk, pls_kg: rate * area, bulk_kg: bulk * area, remarks };
}

/**
 * Kilograms to order for every lot of a mix on a piece of ground; rows as in
 * builder/formulas/seed_order.py.
 *
 * @param {{lots: object[], area_ha: number, base_method: string, method: string,
 *   factors: Record<string, number | null>, sow_month: number, window_months: number[],
 *   today: string, stale_months: number}} of
 */
export function seedOrder({ lots, area_ha, base_method, method, factors, sow_month, window_months, today, stale_months }) {
  const area = needAboveZero('area_ha', area_ha);
  needCount('stale_months', stale_months);
  for (const month of [sow_month, ...window_months]) needCount('month', month);
  const remarks = season(sow_month, window_months);
  if (!lots.length) remarks.push(remark('refuse', 'mix_empty'));
  const [factor, no] = refusal(() => methodFactor({ base: base_method, wanted: method, factors }));
  if (no) remarks.push(remark('refuse', no.message, no.values));
  const lines = lots.map((lot) => line(lot, area, factor, today, stale_months));
  const every = [...lines.flatMap((each) => each.remarks), ...remarks];
  return {
    lines,
    pls_kg: total(lines.map(({ pls_kg }) => pls_kg)),
    bulk_kg: total(lines.map(({ bulk_kg }) => bulk_kg)),
    remarks,
    may_print: !every.some(({ level }) => level === 'refuse'),
  };
}

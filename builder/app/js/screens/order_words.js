/** Remarks of the order sheet as sentences. */
import { monthsWords } from './parts/year.js';
import { listed, monthName, number, t } from './words.js';

/** @param {{level: string, key: string, values: Record<string, unknown>}} remark as core/seed_order.js gives it */
export function remarkWords({ key, values }) {
  const said = { ...values };
  if (said.months && Array.isArray(said.months)) said.months = monthsWords(said.months);
  if (said.month) said.month = monthName(said.month);
  if (said.names) said.names = listed(said.names);
  if (typeof said.share === 'number') said.share = number(said.share * 100, 1);
  return t(`remark.${key}`, said);
}

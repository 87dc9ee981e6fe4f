/**
 * The one way a formula of the phone says no: a RangeError whose message is a word key
 * (`refusal.<key>` in the words files) and whose `values` fill its sentence.
 */

/** @param {string} key @param {Record<string, unknown>} [values] @returns {never} */
export function refuse(key, values = {}) {
  throw Object.assign(new RangeError(key), { values });
}

/** @param {string} field @param {unknown} value @returns {number} */
export function needNumber(field, value) {
  if (typeof value !== 'number' || !Number.isFinite(value)) refuse('not_a_number', { field, value });
  return /** @type {number} */ (value);
}

/** Zero or more. @param {string} field @param {unknown} value */
export function needNotNegative(field, value) {
  const number = needNumber(field, value);
  if (number < 0) refuse('negative', { field, value });
  return number;
}

/** More than zero. @param {string} field @param {unknown} value */
export function needAboveZero(field, value) {
  const number = needNumber(field, value);
  if (number <= 0) refuse('not_above_zero', { field, value });
  return number;
}

/** A share from 0 to 1, ends included. @param {string} field @param {unknown} value */
export function needShare(field, value) {
  const number = needNumber(field, value);
  if (number < 0 || number > 1) refuse('not_a_share', { field, value });
  return number;
}

/** A share above 0 and at most 1, for what is divided by. @param {string} field @param {unknown} value */
export function needSomeShare(field, value) {
  const number = needNumber(field, value);
  if (number <= 0 || number > 1) refuse('share_of_nothing', { field, value });
  return number;
}

/** 0 to 100. @param {string} field @param {unknown} value */
export function needPercent(field, value) {
  const number = needNumber(field, value);
  if (number < 0 || number > 100) refuse('not_a_percent', { field, value });
  return number;
}

/** Strictly between 0 and 1. @param {string} field @param {unknown} value */
export function needOpenShare(field, value) {
  const number = needNumber(field, value);
  if (number <= 0 || number >= 1) refuse('confidence', { field, value });
  return number;
}

/** A whole number of zero or more. @param {string} field @param {unknown} value */
export function needCount(field, value) {
  const number = needNotNegative(field, value);
  if (!Number.isInteger(number)) refuse('not_whole', { field, value });
  return number;
}

/** Twelve finite numbers, January first. @param {string} field @param {number[]} values */
export function needMonths(field, values) {
  if (values.length !== 12) refuse('twelve_months', { field, value: values.length });
  return values.map((value) => needNumber(field, value));
}

/** @param {string} field @param {unknown[]} values @param {string} other @param {unknown[]} others */
export function needSameLength(field, values, other, others) {
  if (values.length !== others.length) refuse('same_length', { field, other });
}

/** Sum of a list, left to right. @param {number[]} values */
export function sum(values) {
  return values.reduce((total, value) => total + value, 0);
}

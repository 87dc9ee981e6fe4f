/** Exact conversions between metric and United States customary units (agreement of 1959). */
import { needNumber, refuse } from './refusal.js';

const KG_PER_LB = 0.45359237;
const HA_PER_ACRE = 0.40468564224;
const M2_PER_FT2 = 0.09290304;

/** @type {Record<string, number>} */
const FACTOR = {
  'lb_acre kg_ha': KG_PER_LB / HA_PER_ACRE,
  'lb kg': KG_PER_LB,
  'oz g': 28.349523125,
  'ft m': 0.3048,
  'in cm': 2.54,
  'in mm': 25.4,
  'acre ha': HA_PER_ACRE,
  'ft2 m2': M2_PER_FT2,
  'yd3 m3': 0.764554857984,
  'per_ft2 per_m2': 1 / M2_PER_FT2,
  'per_lb per_g': 1 / (KG_PER_LB * 1000),
};

/**
 * A value given in one unit, in another. What a person typed is kept as typed by the record;
 * this only shows it.
 *
 * @param {{value: number, unit: string, to: string}} of units as in builder/formulas/units.py
 */
export function converted({ value, unit, to }) {
  const number = needNumber('value', value);
  if (unit === to) return number;
  if (unit === 'c' && to === 'f') return (number * 9) / 5 + 32;
  if (unit === 'f' && to === 'c') return ((number - 32) * 5) / 9;
  if (FACTOR[`${unit} ${to}`]) return number * FACTOR[`${unit} ${to}`];
  if (FACTOR[`${to} ${unit}`]) return number / FACTOR[`${to} ${unit}`];
  return refuse('unknown_choice', { field: 'unit', value: `${unit} to ${to}` });
}

/** Volume of a layer over an area. [yd3] @param {{acres: number, depth_in: number}} of */
export function acresVolumeYd3({ acres, depth_in }) {
  return (needNumber('acres', acres) * 43560 * needNumber('depth_in', depth_in)) / 12 / 27;
}

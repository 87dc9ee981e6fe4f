/** Texture class of mineral soil after the Soil Survey Manual, and the middle of each class. */
import { needPercent, refuse } from './refusal.js';

const SUM_SLACK_PCT = 0.11;

/** @type {Record<string, [number, number]>} sand and clay, Saxton & Rawls 2006, Table 3 */
const CENTRE = {
  sand: [88, 5],
  'loamy sand': [80, 5],
  'sandy loam': [65, 10],
  loam: [40, 20],
  'silt loam': [20, 15],
  silt: [10, 5],
  'sandy clay loam': [60, 25],
  'clay loam': [30, 35],
  'silty clay loam': [10, 35],
  'silty clay': [10, 45],
  'sandy clay': [50, 40],
  clay: [25, 50],
};

/** Sand, silt and clay that add up to 100. @param {{sand_pct: number, silt_pct: number, clay_pct: number}} of */
export function checkedSoil({ sand_pct, silt_pct, clay_pct }) {
  const sand = needPercent('sand_pct', sand_pct);
  const silt = needPercent('silt_pct', silt_pct);
  const clay = needPercent('clay_pct', clay_pct);
  const total = sand + silt + clay;
  if (Math.abs(total - 100) > SUM_SLACK_PCT) refuse('soil_sum', { value: Math.round(total * 1000) / 1000 });
  return [sand, silt, clay];
}

/** Name of the texture class. @param {{sand_pct: number, silt_pct: number, clay_pct: number}} of */
export function textureClass(of) {
  const [sand, silt, clay] = checkedSoil(of);
  if (silt + 1.5 * clay < 15) return 'sand';
  if (silt + 2 * clay < 30) return 'loamy sand';
  if (clay < 27) return classOfLowClay(sand, silt, clay);
  if (sand > 45) return clay >= 35 ? 'sandy clay' : 'sandy clay loam';
  if (clay < 40) return sand <= 20 ? 'silty clay loam' : 'clay loam';
  return silt >= 40 ? 'silty clay' : 'clay';
}

function classOfLowClay(sand, silt, clay) {
  if (silt >= 50) return silt >= 80 && clay < 12 ? 'silt' : 'silt loam';
  if (clay >= 20 && silt < 28) return 'sandy clay loam';
  return sand > 52 || clay < 7 ? 'sandy loam' : 'loam';
}

/** Sand and clay in the middle of a class. [%, %] @param {{texture: string}} of */
export function classCentre({ texture }) {
  return CENTRE[texture] ?? refuse('unknown_choice', { field: 'texture', value: texture });
}

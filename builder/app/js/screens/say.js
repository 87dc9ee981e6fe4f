/** Figures as words: odds, shares, cover classes, heights and lengths in the person's own units. */
import { t, number } from './words.js';
import { units } from './settings.js';
import { rounded } from '../core/rounding.js';
import { converted } from '../core/units.js';
import { coverBounds } from './region.js';

const METRES_PER_FOOT = 0.3048;

/** A share as a whole number in 100, never "0" or "100". @param {number} share 0..1 */
export function percentWords(share) {
  if (share < 0.01) return t('share.under');
  if (share > 0.99) return t('share.over');
  return String(Math.round(share * 100));
}

/** "about 9 in 10". @param {number} share 0..1 */
export function oddsWords(share) {
  if (share > 0.95) return t('odds.nearly');
  return t('odds.about', { tenths: Math.max(1, Math.round(share * 10)) });
}

/** A height in metres or feet. @param {number} metres */
export function heightWords(metres) {
  return units.value === 'us' ? t('unit.ft', { n: Math.round(metres / METRES_PER_FOOT) }) : t('unit.m', { n: Math.round(metres) });
}

/** A cover class of the region's scale: "1–5 %". @param {object} region  @param {string} code */
export function coverWords(region, code, sign = true) {
  const { key, low, high } = coverBounds(region, code);
  const words = t(`cover.${key}`, { low: plain(low), high: plain(high) });
  return sign ? t('cover.pct', { words }) : words;
}

const plain = (value) => number(value, Number.isInteger(value) ? 0 : 1);

/** What was answered for a plant: "none", "1–5 %", "can’t tell". */
export function findingWords(region, finding) {
  if (finding.state === 'not_found') return t('finding.none');
  if (finding.state === 'cant_tell') return t('finding.cant_tell');
  return finding.cover ? coverWords(region, finding.cover) : t('finding.there');
}

/** A stored height in the person's unit, for a box. @param {number} metres */
export const heightShown = (metres) => Math.round(units.value === 'us' ? metres / METRES_PER_FOOT : metres);

/** A typed height in metres, not rounded, so that what was typed comes back. @param {number|null} typed */
export const heightFrom = (typed) => (typed === null ? null : units.value === 'us' ? typed * METRES_PER_FOOT : typed);

export const heightUnit = () => t(units.value === 'us' ? 'unit.ft_sign' : 'unit.m_sign');

const yieldUnit = () => (units.value === 'us' ? 'lb_acre' : 'kg_ha');

/** Growth as the number people read, whole, in their own unit. @param {number} kg_ha */
export const yieldShown = (kg_ha) => rounded(converted({ value: kg_ha, unit: 'kg_ha', to: yieldUnit() }), 0);

/** Growth in words: "1,390 kg/ha". @param {number} kg_ha */
export const yieldWords = (kg_ha) => t(units.value === 'us' ? 'unit.lb_ac' : 'unit.kg_ha', { n: yieldShown(kg_ha) });

/** Typed growth in kg/ha. @param {number|null} typed */
export const yieldFrom = (typed) => (typed === null ? null : converted({ value: typed, unit: yieldUnit(), to: 'kg_ha' }));

export const yieldSign = () => t(units.value === 'us' ? 'unit.lb_ac_sign' : 'unit.kg_ha_sign');

/** Rain or water held. @param {number} mm */
export const waterWords = (mm) => (units.value === 'us' ? t('unit.inch', { n: number(converted({ value: mm, unit: 'mm', to: 'in' }), 1) }) : t('unit.mm', { n: rounded(mm, 0) }));

/** A mass. @param {number} kg */
export const massWords = (kg) => (units.value === 'us'
  ? t('unit.lb', { n: number(rounded(converted({ value: kg, unit: 'kg', to: 'lb' }), 2), 2) })
  : t('unit.kg', { n: number(rounded(kg, 2), 2) }));

/** An area in the person's own unit, for a box. @param {number} ha */
export const areaShown = (ha) => rounded(units.value === 'us' ? converted({ value: ha, unit: 'ha', to: 'acre' }) : ha, 2);

/** A typed area in hectares. @param {number|null} typed */
export const areaFrom = (typed) => (typed === null || units.value !== 'us' ? typed : converted({ value: typed, unit: 'acre', to: 'ha' }));

export const areaSign = () => t(units.value === 'us' ? 'unit.acre_sign' : 'unit.ha_sign');

/** A depth in the ground. @param {number} cm */
export const depthWords = (cm) => (units.value === 'us' ? t('unit.inch', { n: number(converted({ value: cm, unit: 'cm', to: 'in' }), 1) }) : t('unit.cm', { n: rounded(cm, 0) }));

/** A temperature. @param {number} c */
export const warmthWords = (c) => t(units.value === 'us' ? 'unit.f' : 'unit.c', { n: rounded(units.value === 'us' ? converted({ value: c, unit: 'c', to: 'f' }) : c, 1) });

/** A difference of temperature, to type and to keep in degrees C. */
export const warmerShown = (c) => rounded(units.value === 'us' ? c * 1.8 : c, 2);
export const warmerFrom = (typed) => (typed === null ? null : units.value === 'us' ? typed / 1.8 : typed);
export const warmerUnit = () => t(units.value === 'us' ? 'unit.f_sign' : 'unit.c_sign');

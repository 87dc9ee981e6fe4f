/** The year of a zone: rain by month as columns, warmth as a line; warm and moist months are filled. */
import { html } from 'htm/preact';
import { converted } from '../../core/units.js';
import { t, monthName, number } from '../words.js';
import { units } from '../settings.js';

const LEFT = 26;
const WIDTH = 236;
const FLOOR = 104;
const TALL = 78;

/** @param {{year: {rain_mm: number[], mean_c: number[], growing: number[]}, letter: string}} props */
export function YearDiagram({ year, letter }) {
  const us = units.value === 'us';
  const step = WIDTH / 12;
  const most = Math.max(60, Math.ceil(Math.max(...year.rain_mm) / 20) * 20);
  const rain = (mm) => FLOOR - (mm / most) * TALL;
  const [cold, hot] = [Math.min(-10, ...year.mean_c), Math.max(25, ...year.mean_c)];
  const warmth = (c) => FLOOR - 4 - ((c - cold) / (hot - cold)) * (TALL - 4);
  const middle = (i) => LEFT + (i + 0.5) * step;
  const line = `M${year.mean_c.map((c, i) => `${middle(i).toFixed(1)} ${warmth(c).toFixed(1)}`).join('L')}`;
  const degrees = (c) => `${number(us ? converted({ value: c, unit: 'c', to: 'f' }) : c)}°`;
  return html`<svg class="chart yearly" viewBox="0 0 290 152" role="img" aria-label=${t('book.year_filled', { n: year.growing.length })}>
    ${year.rain_mm.map((mm, i) => {
      const filled = year.growing.includes(i + 1);
      return html`<rect class=${filled ? 'col' : 'col pale'} x=${LEFT + i * step + 2} y=${rain(mm)} width=${step - 4} height=${FLOOR - rain(mm)} fill=${filled ? `url(#p-${letter})` : undefined}/><text class="tick" x=${middle(i)} y="122" text-anchor="middle">${monthName(i + 1, 'narrow')}</text>`;
    })}
    <path class="under-line" d=${line}/><path class="warm-line" d=${line}/><path class="ax" d=${`M${LEFT} ${FLOOR}h${WIDTH}`}/>
    <text class="tick" x="22" y=${FLOOR + 4} text-anchor="end">0</text><text class="tick" x="22" y=${rain(most) + 5} text-anchor="end">${us ? number(most / 25.4, 1) : most}</text><text class="tick" x="0" y="12">${us ? t('unit.in_sign') : t('unit.mm_sign')}</text>
    <text class="tick" x="266" y=${warmth(0) + 4}>${degrees(0)}</text><text class="tick" x="266" y=${warmth(15) + 4}>${degrees(15)}</text>
    <text class="tick" x="145" y="146" text-anchor="middle">${t('book.year_filled', { n: year.growing.length })}</text></svg>`;
}

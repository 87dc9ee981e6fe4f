/** Production against this year: the range as a filled belt, the normal year a dashed ghost,
 *  the measure a pin flag with its doubt as a box. Drawn to the width it gets. */
import { html } from 'htm/preact';
import { t, number } from '../words.js';
import { yieldShown, yieldSign } from '../say.js';

const W = 342;
const LEFT = 8;

/** @param {{zone: object, range: [number, number], normal: [number, number]|null, middle: number|null, measured: {mean: number, take: number|null}|null}} props kg/ha */
export function RangeBar({ zone, range, normal, middle, measured }) {
  const most = Math.max(range[1], normal?.[1] ?? 0, measured ? measured.mean + (measured.take ?? 0) : 0);
  const step = niceStep(yieldShown(most) / 4);
  const top = Math.ceil((yieldShown(most) * 1.12) / step) * step;
  const at = (kg_ha) => LEFT + (yieldShown(kg_ha) / top) * W;
  const ticks = Array.from({ length: Math.floor(top / step) + 1 }, (_, i) => i * step);
  const [low, high] = range.map(at);
  // Without a pin flag or a ghost the sky above the bar is left out.
  const sky = measured ? 0 : 48;
  return html`<svg class="chart" viewBox=${`0 ${sky} 358 ${196 - sky}`} role="img" aria-label=${spoken(range, measured)}>
    ${normal && html`<rect class="ghost" x=${at(normal[0])} y="58" width=${at(normal[1]) - at(normal[0])} height="16"/><text class="tick halo" x=${Math.min(at(normal[1]) + 8, 300)} y=${at(normal[1]) > 292 ? 52 : 71}>${t('production.normal')}</text>`}
    <rect class="band" x=${low} y="84" width=${high - low} height="44" fill=${`url(#p-${zone.letter})`}/>
    ${middle !== null && html`<path class="midline" d=${`M${at(middle)} 78v56`}/><text class="tick" x=${at(middle)} y="72" text-anchor="middle">${number(yieldShown(middle))}</text>`}
    <text class="end halo" x=${low > 60 ? low - 6 : low} y=${low > 60 ? 112 : 80} text-anchor=${low > 60 ? 'end' : 'start'}>${number(yieldShown(range[0]))}</text>
    <text class="end halo" x=${high < 300 ? high + 7 : 350} y=${high < 300 ? 112 : 80} text-anchor=${high < 300 ? 'start' : 'end'}>${number(yieldShown(range[1]))}</text>
    <path class="ax" d=${`M${LEFT} 142h${W}`}/>${ticks.map((value) => html`<path class="ax" d=${`M${LEFT + (value / top) * W} 142v6`}/><text class="tick" x=${LEFT + (value / top) * W} y="164" text-anchor="middle">${number(value)}</text>`)}
    <text class="tick" x="350" y="186" text-anchor="end">${t('production.axis', { unit: yieldSign() })}</text>
    ${measured && html`<${Flag} x=${at(measured.mean)} half=${measured.take === null ? 0 : at(measured.mean + measured.take) - at(measured.mean)} text=${number(yieldShown(measured.mean))}/>`}</svg>`;
}

function Flag({ x, half, text }) {
  const left = x > 116;
  return html`${half > 2 && html`<rect class="doubt" x=${x - half} y="98" width=${2 * half} height="16"/>`}
    <path class="mineline" d=${`M${x} 142V10`}/><path class="mine" d=${`M${x} 8h${left ? -100 : 100}v34h${left ? 100 : -100}z`}/>
    <text class="onflag" x=${left ? x - 92 : x + 8} y="30">${text} <tspan>${t('production.yours')}</tspan></text>`;
}

function niceStep(rough) {
  const power = 10 ** Math.floor(Math.log10(rough));
  return [1, 2, 5, 10].find((one) => one * power >= rough) * power;
}

function spoken(range, measured) {
  const figures = { low: number(yieldShown(range[0])), high: number(yieldShown(range[1])), unit: yieldSign() };
  return measured ? t('production.chart_both', { ...figures, mine: number(yieldShown(measured.mean)) }) : t('production.chart', figures);
}

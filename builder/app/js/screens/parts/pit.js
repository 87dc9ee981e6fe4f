/** The soil pit: layers to scale, paler downwards, stones by share, what each holds. */
import { html } from 'htm/preact';
import { t, number } from '../words.js';
import { waterWords } from '../say.js';

const TALL = 180;
const STONE = 'l4-3 5 2 1 4-5 3-4-2z';

/** @param {{soil: object, water: {mm: number}[], textures: string[]}} props one texture a layer, in words */
export function Pit({ soil, water, textures }) {
  const { layers } = soil;
  const deep = layers.at(-1).bottom_cm;
  const at = (cm) => 14 + (cm / deep) * TALL;
  const least = 40;
  let floor = 0;
  return html`<svg class="chart pit" viewBox=${`0 0 290 ${TALL + 34}`} role="img" aria-label=${layers.map((layer, i) => `${layer.top_cm}–${layer.bottom_cm} cm: ${textures[i]}.`).join(' ')}>
    ${layers.map((layer, i) => {
      const top = at(layer.top_cm);
      const text = Math.max(top + 20, floor);
      floor = text + least;
      return html`<rect class="layer" x="28" y=${top} width="80" height=${at(layer.bottom_cm) - top} style=${{ fillOpacity: Math.max(0.1, 0.62 - i * 0.2) }}/>
        ${stones(layer, top, at(layer.bottom_cm), i).map((place) => html`<path class="stone" d=${`M${place}${STONE}`}/>`)}
        <text class="tick" x="22" y=${top + 10} text-anchor="end">${layer.top_cm}</text>
        <text class="end" x="120" y=${text}>${textures[i]}</text><text class="tick" x="120" y=${text + 17}>${[water[i] && (water[i].mm > 0 ? t('book.holds', { water: waterWords(water[i].mm) }) : t('book.below_roots')), layer.ph && t('book.ph', { ph: number(layer.ph, 1) })].filter(Boolean).join(', ')}</text>`;
    })}
    <path class="turf" d="M28 12q10-6 20 0t20 0 20 0 20 0"/><text class="tick" x="22" y=${at(deep)} text-anchor="end">${deep}</text><text class="tick" x="28" y=${at(deep) + 18}>cm</text></svg>`;
}

/** Stones as many as their share of the volume asks, in the same places every time. */
function stones(layer, top, bottom, seed) {
  const n = Math.round((layer.stones_vol_pct / 100) * ((80 * (bottom - top)) / 55));
  return Array.from({ length: n }, (_, i) => {
    const across = ((i * 37 + seed * 23) % 64) + 32;
    const down = top + 8 + ((i * 53 + seed * 17) % Math.max(1, Math.round(bottom - top - 14)));
    return `${across} ${down}`;
  });
}

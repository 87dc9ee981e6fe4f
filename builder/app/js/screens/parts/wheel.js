/** Facing wheel: eight keys round a hub that holds the slope. */
import { html } from 'htm/preact';
import { t } from '../words.js';
import { Typed } from './choice.js';
import { Tilt } from './tilt.js';
import { readNumber } from './read_number.js';

const POINTS = ['n', 'ne', 'e', 'se', 's', 'sw', 'w', 'nw'];
const OUTER = 126;
const INNER = 62;
const GAP_DEG = 2.6;
const MID = 130;

const at = (radius, deg) => {
  const turn = ((deg - 90) * Math.PI) / 180;
  return `${(MID + radius * Math.cos(turn)).toFixed(1)} ${(MID + radius * Math.sin(turn)).toFixed(1)}`;
};

function piece(i) {
  const from = i * 45 - 22.5 + GAP_DEG / 2;
  const to = i * 45 + 22.5 - GAP_DEG / 2;
  return `M${at(INNER, from)}L${at(OUTER, from)}A${OUTER} ${OUTER} 0 0 1 ${at(OUTER, to)}L${at(INNER, to)}A${INNER} ${INNER} 0 0 0 ${at(INNER, from)}z`;
}

/** @param {{place: object, onPlace: (place: object) => void}} props */
export function Wheel({ place, onPlace }) {
  const chosen = place.aspect_deg === null ? null : Math.round(place.aspect_deg / 45) % 8;
  const pick = (i) => onPlace({ ...place, aspect_deg: chosen === i ? null : i * 45 });
  const key = (event, i) => {
    if (event.key !== 'Enter' && event.key !== ' ') return;
    event.preventDefault();
    pick(i);
  };
  const slope = place.slope_pct;
  return html`<svg class="rose" viewBox="0 0 260 260" role="group" aria-label=${t('place.facing')}>
    ${POINTS.map((name, i) => html`<g key=${name} role="button" tabindex="0" aria-pressed=${String(chosen === i)} aria-label=${t(`facing.${name}`)}
        onClick=${() => pick(i)} onKeyDown=${(event) => key(event, i)}>
      <path class=${`seg8 ${chosen === i ? 'on' : ''}`} d=${piece(i)}/><text aria-hidden="true" x=${at(95, i * 45).split(' ')[0]} y=${Number(at(95, i * 45).split(' ')[1]) + 5}>${t(`facing.short_${name}`)}</text></g>`)}
    <circle class="hub" cx="130" cy="130" r="55"/><circle class="ring" cx="130" cy="130" r="44"/>
    <path class="ring" d="M96 148q17-12 34-4t34-10M104 160q13-8 26-3t26-6"/>
    <text x="130" y="112" class="hubword">${t('place.slope')}</text>
    <text class="hubtext" x="130" y="138">${slope === null ? '–' : t('unit.pct', { n: slope })}</text></svg>
    <div class="slope">${[0, 5, 12, 25, 45, 70].map((pct) => html`<button key=${pct} type="button" class="chip" aria-pressed=${String(slope === pct)}
      onClick=${() => onPlace({ ...place, slope_pct: slope === pct ? null : pct })}>${pct === 0 ? t('place.level') : t('unit.pct', { n: pct })}</button>`)}
      <label class="chip typed"><span class="spoken">${t('place.slope_typed')}</span><${Typed} mode="decimal" placeholder=${t('place.slope_other')} value=${slope ?? ''} limits=${[0, 200]} onChange=${(text) => onPlace({ ...place, slope_pct: readNumber(text, 0, 200) })}/><i>%</i></label></div>
    <${Tilt} onSlope=${(slope_pct) => onPlace({ ...place, slope_pct })}/>`;
}

export { readNumber };

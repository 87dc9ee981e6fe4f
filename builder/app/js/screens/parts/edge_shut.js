/** The fore-edge shut: every belt as a thin strip, high at the top. Decoration beside lists. */
import { html } from 'htm/preact';
import { Fill } from './patterns.js';

/** @param {{belts: object[]}} props zonal belts, low to high */
export function EdgeShut({ belts }) {
  return html`<div class="edge shut" aria-hidden="true">${[...belts].reverse().map((zone) => html`<i><${Fill} letter=${zone.letter}/></i>`)}</div>`;
}

/** The small column in a list row: where on the slope, and how sure. @param {{region: object, belief: object|null}} props */
export function EdgeMini({ region, belief }) {
  const step = 52 / region.belts.length;
  return html`<svg class="mini" viewBox="0 0 42 54" aria-hidden="true">
    ${region.belts.map((zone) => {
      const y = 53 - step * (zone.place + 1);
      const share = belief?.[zone.id] ?? 0;
      return html`<rect class="base" x="1" y=${y} width="30" height=${step} style=${{ fill: zone.colour }}/>
        ${share >= 0.02 && html`<rect class="full" x="1" y=${y} width=${30 * share} height=${step} style=${{ fill: zone.colour }}/>`}`;
    })}
    <path class="frame" d="M1 1h30v52H1z"/>
    ${region.lenses.map((zone) => {
      const y = lensHeight(region, zone) * 46 + 4;
      const share = belief?.[zone.id] ?? 0;
      return html`<ellipse class="pool0" cx="37" cy=${54 - y} rx="3.6" ry="4.4"/>
        ${share >= 0.2 && html`<ellipse class="full" cx="37" cy=${54 - y} rx=${1 + 2.2 * share} ry=${1 + 3 * share} style=${{ fill: zone.colour }}/>`}`;
    })}</svg>`;
}

/** Where a lens lies along the stack, 0 foot to 1 top, kept apart from its neighbours. */
export function lensHeight(region, zone) {
  const slots = lensSlots(region);
  return slots.get(zone.id);
}

const kept = new WeakMap();

function lensSlots(region) {
  if (kept.has(region)) return kept.get(region);
  const low = Math.min(...region.zones.map((zone) => zone.band_m[0]));
  const high = Math.max(...region.zones.map((zone) => zone.band_m[1]));
  const gap = 1 / Math.max(8, region.lenses.length + 1);
  const sorted = [...region.lenses].sort((a, b) => a.centre_m - b.centre_m || a.index - b.index);
  const slots = new Map();
  let floor = 0;
  sorted.forEach((zone, i) => {
    const room = 1 - gap * (sorted.length - 1 - i);
    const wanted = (zone.centre_m - low) / (high - low);
    const at = Math.min(Math.max(wanted, floor), room);
    slots.set(zone.id, at);
    floor = at + gap;
  });
  kept.set(region, slots);
  return slots;
}

/** The fore-edge as the Book's thumb index: every zone a key at its place on the slope. */
import { html } from 'htm/preact';
import { t } from '../words.js';
import { Fill } from './patterns.js';
import { lensHeight } from './edge_shut.js';

/** All zones, high at the top, ground off the slope at its own height. */
export function upslope(region) {
  const count = region.belts.length;
  const at = (zone) => (zone.kind === 'zonal' ? zone.place + 0.5 : lensHeight(region, zone) * count + 0.01);
  return [...region.zones].sort((a, b) => at(b) - at(a));
}

/** @param {{region: object, current: string|null}} props */
export function EdgeIndex({ region, current }) {
  return html`<nav class="edge index" aria-label=${t('book.tabs')}>${upslope(region).map((zone) => html`<a key=${zone.id} class=${`key ${zone.kind === 'azonal' ? 'off' : ''}`} href=${`#/book/zone/${zone.id}`}
    aria-current=${zone.id === current ? 'page' : undefined} aria-label=${zone.short}><i><${Fill} letter=${zone.letter}/></i><b>${zone.letter}</b></a>`)}</nav>`;
}

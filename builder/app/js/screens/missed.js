/** Expected here, searched for and not found, with the chance that such a plot misses them. */
import { html } from 'htm/preact';
import { expectedMissed } from '../core/missed.js';
import { t } from './words.js';
import { region } from './state.js';
import { percentWords } from './say.js';

const SHOWN = 6;

/** @param {{zone: object, record: object}} props */
export function Missed({ zone, record }) {
  const here = region.value;
  const rows = expectedMissed(here.pack, record, zone.id).slice(0, SHOWN);
  if (rows.length === 0) return null;
  return html`<section class="part stack"><h2 class="sides">${t('missed.title')}<span class="label">${t('missed.chance')}</span></h2>
    <ul class="plain-list">${rows.map(({ plant_id, chance }) => html`<li key=${plant_id}><a class="two-sides" href=${`#/book/plant/${plant_id}`}><span>${here.plant.get(plant_id).common}</span><b>${percentWords(chance)}</b></a></li>`)}</ul>
    <p class="small quiet">${t('missed.why', { zone: zone.short })}</p></section>`;
}

/** Cover hoops of the region's own scale, large, with their bounds. */
import { html } from 'htm/preact';
import { t } from './words.js';
import { region } from './state.js';
import { coverWords } from './say.js';
import { Hoop } from './parts/hoop.js';

/** @returns one hoop for each class */
export function Covers() {
  const here = region.value;
  return html`<section class="part lead0"><ul class="hoops">${here.cover.map((one) => html`<li key=${one.code}><${Hoop} mid_pct=${one.mid_pct}/><b>${coverWords(here, one.code)}</b><span class="label">${t('cover.code', { code: one.code, mid: one.mid_pct })}</span></li>`)}</ul></section>`;
}

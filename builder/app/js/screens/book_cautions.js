/** Cautions of the whole region, what can kill first, each with when and in which zones it holds. */
import { html } from 'htm/preact';
import { listed, t } from './words.js';
import { region } from './state.js';
import { Icon } from './parts/icon.js';

const LEVELS = ['deadly', 'harm', 'care'];

/** @returns one list for each level that the tables hold, then who comes before this book */
export function Cautions() {
  const all = region.value.texts.region.cautions;
  return html`<section class="part lead0"><p class="small">${t('reclaim.defer')}</p></section>
    ${LEVELS.map((level) => html`<${Level} key=${level} level=${level} rows=${all.filter((one) => one.level === level)}/>`)}`;
}

function Level({ level, rows }) {
  if (rows.length === 0) return null;
  return html`<section class="part"><h2>${t(`book.caution_${level}`)}</h2><ul class="cautions">${rows.map((one) => html`<li key=${one.text}><${Icon} name="warn"/><span>${one.who === 'people' ? one.text : t(`caution.${one.who}`, { text: one.text })}
    ${one.when && html` <span class="quiet">${t('reclaim.caution_when', { when: one.when })}</span>`}${one.zones && html`<small>${where(one.zones)}</small>`}</span></li>`)}</ul></section>`;
}

const where = (ids) => t('book.caution_zones', { zones: listed(ids.map((id) => region.value.zone.get(id)?.short ?? id)) });

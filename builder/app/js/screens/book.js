/** The Book: zones by their thumb tabs, plants, the diagonal chart, cover hoops, soil by feel, sources. */
import { html } from 'htm/preact';
import { t } from './words.js';
import { region } from './state.js';
import { Bar } from './parts/bar.js';
import { EdgeIndex, upslope } from './parts/edge_index.js';
import { EdgeShut } from './parts/edge_shut.js';
import { Foot } from './parts/foot.js';
import { Icon } from './parts/icon.js';
import { Later } from './parts/later.js';
import { provenance } from './parts/source.js';
import { ZonePage } from './book_zone.js';

const PlantsPage = Later(() => import('./book_plants.js'), 'PlantsPage');
const PlantPage = Later(() => import('./book_plants.js'), 'PlantPage');
const Chart = Later(() => import('./book_chart.js'), 'Chart');
const Covers = Later(() => import('./book_covers.js'), 'Covers');
const Dangers = Later(() => import('./book_cautions.js'), 'Cautions');
const Feel = Later(() => import('./book_feel.js'), 'Feel');

const CONTENTS = [['cautions', 'warn'], ['plants', 'plants'], ['chart', 'zone'], ['covers', 'place'], ['soil', 'pit'], ['sources', 'source']];

/** @param {{parts: string[]}} props [] · ['zone', id] · ['plant', id] · ['plants'] · ['chart'] · ['covers'] · ['soil'] · ['cautions'] · ['sources'] */
export function Book({ parts: [page = 'contents', id] }) {
  const here = region.value;
  const zone = here.zone.get(id);
  const plant = here.plant.get(id);
  const line = t('book.line', { region: here.name, edition: here.edition });
  if (page === 'zone' && zone) return html`<${Page} title=${t('book.title')} line=${line} back="#/book" edge=${html`<${EdgeIndex} region=${here} current=${zone.id}/>`}><${ZonePage} key=${zone.id} zone=${zone}/></${Page}>`;
  if (page === 'plant' && plant) return html`<${Page} title=${t('book.title')} line=${line} back="#/book/plants"><${PlantPage} key=${plant.id} plant=${plant}/></${Page}>`;
  if (page === 'plants') return html`<${Page} title=${t('book.plants')} line=${line} back="#/book" class="find-page"><${PlantsPage}/></${Page}>`;
  if (page === 'chart') return html`<${Page} title=${t('book.chart')} line=${t('book.chart_line')} back="#/book"><${Chart}/></${Page}>`;
  if (page === 'covers') return html`<${Page} title=${t('book.covers')} line=${t('book.covers_line')} back="#/book" still><${Covers}/></${Page}>`;
  if (page === 'soil') return html`<${Page} title=${t('feel.title')} line=${t('feel.line')} back="#/book"><${Feel}/></${Page}>`;
  if (page === 'cautions') return html`<${Page} title=${t('book.cautions')} line=${line} back="#/book" still><${Dangers}/></${Page}>`;
  if (page === 'sources') return html`<${Page} title=${t('book.sources')} line=${line} back="#/book" still><${Sources}/></${Page}>`;
  return html`<${Page} title=${t('book.title')} line=${line} edge=${html`<${EdgeIndex} region=${here} current=${null}/>`}><${Contents}/></${Page}>`;
}

/** still: a page with nothing to press on it takes the focus itself, so that keys can scroll it. */
function Page({ title, line, back, edge, children, still = false, class: shape = '' }) {
  return html`<div class="page p-book"><${Bar} title=${title} line=${line} back=${back}/>${edge ?? html`<${EdgeShut} belts=${region.value.belts}/>`}<main class=${shape} tabindex=${still ? 0 : undefined}>${children}</main><${Foot} current="book"/></div>`;
}

function Contents() {
  const here = region.value;
  return html`<section class="part lead0"><h2>${t('book.contents')}</h2>${here.pack.region.invented && html`<p class="stamp">${t('sites.invented')}</p>`}
    <ul class="next">${CONTENTS.map(([name, icon]) => html`<li key=${name}><a href=${`#/book/${name}`}><${Icon} name=${icon}/><span>${name === 'soil' ? t('feel.title') : t(`book.${name}`)}</span></a></li>`)}</ul></section>
    <section class="part"><h2>${t('book.zones')}</h2><ul class="next">${upslope(here).map((zone) => html`<li key=${zone.id}><a href=${`#/book/zone/${zone.id}`}><b class="letter">${zone.letter}</b><span>${zone.name}</span></a></li>`)}</ul></section>`;
}

function Sources() {
  const here = region.value;
  return html`<section class="part lead0"><p>${here.texts.region.note}</p><ul class="plain-list">${['demo', 'common practice', ...Object.keys(here.texts.sources)].map((key) => html`<li key=${key}>${provenance(here, key)}</li>`)}</ul></section>`;
}

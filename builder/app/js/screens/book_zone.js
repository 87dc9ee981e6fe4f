/** A zone's page: what it is, its heights, its year, what grows, the pit, what it is told from. */
import { html } from 'htm/preact';
import { useState } from 'preact/hooks';
import { textureClass } from '../core/texture.js';
import { listed, number, sentence, t } from './words.js';
import { region } from './state.js';
import { heightShown, heightWords, waterWords, yieldWords } from './say.js';
import { Form } from './parts/icon.js';
import { Hoop } from './parts/hoop.js';
import { Fill } from './parts/patterns.js';
import { Pit } from './parts/pit.js';
import { Source } from './parts/source.js';
import { Tab } from './parts/tab.js';
import { YearDiagram } from './parts/year_diagram.js';
import { growsIn, normalsOf, soilOf, waterOf, yearOf } from './pack_reading.js';

const SHOWN = 10;

/** @param {{zone: object}} props */
export function ZonePage({ zone }) {
  const here = region.value;
  const year = yearOf(here, zone);
  const soil = soilOf(here, zone.id);
  const limits = zone.limits ?? [];
  return html`<section class="part lead0 stack"><${Tab} zone=${zone} size="big"/><h2 class="name">${zone.name}</h2><p class="lead">${zone.one_line}</p></section>
    <section class="part"><p><b>${t('book.why_here')}</b> ${zone.why_here}</p>${limits.length > 0 && html`<p class="small">${t('book.limits')}: ${listed(limits)}.</p>`}<${Facts} zone=${zone} region=${here}/></section>
    ${year && html`<section class="part"><h2>${t('book.year')}</h2><${YearDiagram} year=${year} letter=${zone.letter}/></section>`}
    <${Grows} zone=${zone} region=${here}/>
    <section class="part"><h2>${t('book.pit')}</h2>${soil ? html`<p class="small">${t('book.soil', { summary: sentence(soil.summary), restriction: soil.restriction })}</p><${Pit} soil=${soil} water=${waterOf(here, soil)} textures=${soil.layers.map((layer) => (layer.kind && layer.kind !== 'mineral' ? t(`layer.${layer.kind}`) : textureClass(layer)))}/>` : html`<p>${t('book.no_soil')}</p>`}</section>
    <${Told} zone=${zone} region=${here}/>
    <section class="part"><dl class="notes">${zone.remnant_clues && html`<dt>${t('book.remnants')}</dt><dd>${zone.remnant_clues}</dd>`}${zone.what_absence_means && html`<dt>${t('book.absence')}</dt><dd>${zone.what_absence_means}</dd>`}</dl>
      <${Source} what=${t('production.these')} region=${here} keys=${[here.pack.production[zone.id]?.source ?? 'demo']}/></section>`;
}

function Facts({ zone, region: here }) {
  const normals = normalsOf(here, zone);
  const rain = normals?.precip_mm.reduce((sum, mm) => sum + mm, 0);
  const production = here.pack.production[zone.id];
  const shift = (metres) => (metres === 0 ? t('book.same') : t(metres < 0 ? 'book.lower' : 'book.higher', { distance: heightWords(Math.abs(metres)) }));
  const facts = [
    [t('book.height'), t('book.band', { low: number(heightShown(zone.band_m[0])), high: heightWords(zone.band_m[1]) })],
    zone.kind === 'zonal' && [t('book.north'), shift(zone.north_shift_m)],
    rain && [t('book.rain'), waterWords(rain)],
    production && [t('book.growth'), yieldWords(production.normal_kg_ha)],
  ].filter(Boolean);
  return html`<dl class="facts">${facts.map(([name, value]) => html`<div key=${name}><dt class="label">${name}</dt><dd><b>${value}</b></dd></div>`)}</dl>`;
}

function Grows({ zone, region: here }) {
  const [all, showAll] = useState(false);
  const rows = growsIn(here, zone.id);
  const shown = all ? rows : rows.slice(0, SHOWN);
  const hoop = (cover) => here.cover.find((one) => cover < one.high_pct)?.mid_pct ?? here.cover.at(-1).mid_pct;
  return html`<section class="part"><h2 class="sides">${t('book.grows')}<span class="label">${t('book.grows_line')}</span></h2>
    <ul class="grow">${shown.map(({ plant, constancy_pct: pct, cover_pct: cover }) => html`<li key=${plant.id}><a href=${`#/book/plant/${plant.id}`}><${Form} form=${plant.form}/><span>${plant.common}</span>
      <span class="bar5" role="img" aria-label=${t('book.of_plots', { pct: number(pct) })}><i style=${{ width: `${pct}%` }}><${Fill} letter=${zone.letter}/></i></span><${Hoop} mid_pct=${hoop(cover)}/></a></li>`)}</ul>
    ${!all && rows.length > SHOWN && html`<button type="button" class="btn plain left" onClick=${() => showAll(true)}>${t('book.grows_more', { n: rows.length - SHOWN })}</button>`}</section>`;
}

function Told({ zone, region: here }) {
  const told = Object.entries(zone.told_from ?? {});
  if (told.length === 0) return null;
  return html`<section class="part"><h2>${t('book.told')}</h2>${told.map(([id, text]) => html`<a class="kin" key=${id} href=${`#/book/zone/${id}`}><${Tab} zone=${here.zone.get(id)}/><span><b>${here.zone.get(id).short}</b><span class="small">${text}</span></span></a>`)}</section>`;
}

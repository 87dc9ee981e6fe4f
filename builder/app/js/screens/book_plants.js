/** Plants of the Book: the list by name or form, and one plant's page. */
import { html } from 'htm/preact';
import { useState } from 'preact/hooks';
import { has, monthName, t } from './words.js';
import { region } from './state.js';
import { harmsPeople } from './region.js';
import { Form, Icon } from './parts/icon.js';
import { Danger } from './parts/plant_card.js';
import { Source } from './parts/source.js';
import { Tab } from './parts/tab.js';
import { findPlants } from './plant_search.js';
import { occurrenceOf } from './pack_reading.js';

/** The list: search below, alphabetical above. */
export function PlantsPage() {
  const here = region.value;
  const [text, setText] = useState('');
  const [form, setForm] = useState(null);
  const forms = [...new Set(here.plants.map((plant) => plant.form))];
  const found = (text ? findPlants(here, text).map((hit) => hit.plant) : [...here.plants].sort((a, b) => (a.common < b.common ? -1 : 1))).filter((plant) => !form || plant.form === form);
  return html`<div class="found"><ul>${found.map((plant) => html`<li key=${plant.id}><a class="row" href=${`#/book/plant/${plant.id}`}><${Form} form=${plant.form}/><span class="what">${harmsPeople(plant) && html`<span class="care"><${Icon} name="warn"/><span class="spoken">${t('find.caution')}</span></span>`}${plant.common}<span class="latin">${plant.scientific}</span></span><${Icon} name="next" class="quiet"/></a></li>`)}</ul>
      ${found.length === 0 && html`<p class="part quiet">${t('find.nothing')}</p>`}</div>
    <div class="dock"><div class="scroll-x" role="group" aria-label=${t('find.forms')}>${forms.map((one) => html`<button key=${one} type="button" class="chip" aria-pressed=${String(one === form)} onClick=${() => setForm(one === form ? null : one)}>${has(`form.${one}`) ? t(`form.${one}`) : one}</button>`)}</div>
      <div class="search"><${Icon} name="find"/><input type="search" autocomplete="off" spellcheck="false" aria-label=${t('find.box')} placeholder=${t('find.box')} value=${text} onInput=${(event) => setText(event.currentTarget.value)}/>
        ${text && html`<button type="button" aria-label=${t('find.clear')} onClick=${() => setText('')}><${Icon} name="close"/></button>`}</div></div>`;
}

/** One plant: caution first where it can hurt, marks, look-alikes, months, where it grows. */
export function PlantPage({ plant }) {
  const here = region.value;
  const at = here.plants.indexOf(plant);
  const zones = here.zones.map((zone) => ({ zone, ...occurrenceOf(here, at, zone.index) })).filter((row) => row.constancy_pct > 0);
  const care = plant.cautions.filter((one) => one.who !== 'people' || one.level === 'care');
  const names = [...(plant.local ?? []), ...(plant.codes ?? []), ...(plant.synonyms ?? [])];
  const alike = plant.lookalikes.map((p) => here.plants[p]);
  return html`<${Danger} plant=${plant}/><section class="part lead0"><div class="title"><div><h2>${plant.common}</h2><p class="latin">${plant.scientific}</p></div><${Form} form=${plant.form}/></div>
      <p class="marks">${plant.marks}</p>${care.map((one) => html`<p class="hint care"><${Icon} name="warn"/><span>${t(`caution.${one.who}`, { text: one.text })}</span></p>`)}</section>
    ${(plant.lookalike_tell || alike.length > 0) && html`<section class="part"><h2><${Icon} name="alike"/>${t('book.alike')}</h2><p>${plant.lookalike_tell}</p>${alike.map((other) => html`<a class="kin" key=${other.id} href=${`#/book/plant/${other.id}`}><${Form} form=${other.form}/><span><b>${other.common}</b><span class="small">${other.marks}</span></span></a>`)}</section>`}
    <section class="part"><h2>${t('book.where')}</h2><ul class="plain-list">${zones.map(({ zone, constancy_pct: pct }) => html`<li key=${zone.id}><a class="two-sides" href=${`#/book/zone/${zone.id}`}><span class="withtab"><${Tab} zone=${zone} size="small"/> ${zone.short}</span><span class="label">${t('book.of_plots', { pct })}</span></a></li>`)}</ul></section>
    <section class="part"><dl class="notes"><dt>${t('book.months')}</dt><dd>${monthsOf(plant)}${plant.known_when_dry ? `, ${t('book.dry_too')}` : ''}</dd>${names.length > 0 && html`<dt>${t('book.names')}</dt><dd>${names.join(', ')}</dd>`}</dl>
      <${Source} what=${t('production.these')} region=${here} keys=${[plant.source]}/></section>`;
}

function monthsOf({ months: [from, to] }) {
  if (from === 1 && to === 12) return t('book.all_year');
  return t('year.span', { from: monthName(from), to: monthName(to) });
}

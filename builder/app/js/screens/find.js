/** Find: any plant by any name, the box under the thumb; or by growth form; or lately used. */
import { html } from 'htm/preact';
import { useState } from 'preact/hooks';
import { has, t } from './words.js';
import { region, site, sites } from './state.js';
import { findingOf } from './findings.js';
import { harmsPeople } from './region.js';
import { Form, Icon } from './parts/icon.js';
import { Picture } from './listed.js';
import { findPlants, groupsAmong } from './plant_search.js';

const SHOWN = 24;

/** @param {{root: string, naming: boolean, head?: unknown, onDone?: () => void}} props
 *  naming: asks for the plants that cover most; head: what stands above the list until a name is typed */
export function Find({ root, naming, head, onDone }) {
  const here = region.value;
  const [text, setText] = useState('');
  const [form, setForm] = useState(null);
  const [limit, setLimit] = useState(SHOWN);
  const hits = hitsFor(here, text, form);
  const some = groupsAmong(here, text ? hits : [], text);
  const to = (id) => `${root}/${naming ? 'name' : 'enter'}/${id}`;
  const pick = (next) => { setForm(next === form ? null : next); setLimit(SHOWN); };
  return html`<div class="found">${!text && !form && head}<ul aria-label=${t('find.results')}>
      ${some.map((group) => html`<li key=${group.id}><a class="row some" href=${to(group.id)}><${Form} form=${here.plants[group.members[0]].form}/>
        <span class="what"><b>${harmsPeople(group) && html`<span class="care"><${Icon} name="warn"/><span class="spoken">${t('find.caution')}</span></span>`}${group.name}</b><span class="quiet small">${t('find.some')}</span></span><span class="state"><${Icon} name="plus"/></span></a></li>`)}
      ${!text && !form && hits.length > 0 && html`<li class="label head">${t('find.lately')}</li>`}
      ${hits.slice(0, limit).map((hit) => html`<${Row} key=${hit.plant.id} hit=${hit} text=${text} to=${to(hit.plant.id)}/>`)}
      ${hits.length === 0 && some.length === 0 && html`<li class="quiet part">${t(text ? 'find.nothing' : 'find.start')}</li>`}
      ${hits.length > limit && html`<li><button type="button" class="btn plain wide" onClick=${() => setLimit(limit + 60)}>${t('find.more', { n: hits.length - limit })}</button></li>`}</ul></div>
    <div class="dock"><div class="scroll-x" role="group" aria-label=${t('find.forms')}>${formsOf(here).map((one) => html`<button key=${one} type="button" class="chip" aria-pressed=${String(one === form)} onClick=${() => pick(one)}>${formName(one)}</button>`)}</div>
      <div class="search"><${Icon} name="find"/><input type="search" enterkeyhint="search" autocomplete="off" autocapitalize="none" spellcheck="false" aria-label=${t('find.box')} placeholder=${t('find.box')} value=${text}
        onInput=${(event) => { setText(event.currentTarget.value); setLimit(SHOWN); }}/>
        ${text && html`<button type="button" aria-label=${t('find.clear')} onClick=${() => setText('')}><${Icon} name="close"/></button>`}</div>
      ${naming && html`<button type="button" class="btn plain wide" onClick=${onDone}>${t('named.enough')}</button>`}</div>
    <p class="spoken" role="status">${text ? t('find.count', { n: hits.length }) : ''}</p>`;
}

function Row({ hit, text, to }) {
  const { plant, by } = hit;
  const finding = findingOf(site.value, plant.id);
  const other = by !== plant.common && by !== plant.scientific ? by : null;
  return html`<li><a class="row" href=${to}><${Form} form=${plant.form}/>
    <span class="what">${harmsPeople(plant) && html`<span class="care"><${Icon} name="warn"/><span class="spoken">${t('find.caution')}</span></span>`}<${Marked} name=${plant.common} text=${text}/>
      <span class="latin">${shortened(plant.scientific)}${other ? html` <span class="by">${t('find.by', { name: other })}</span>` : ''}</span></span>
    <span class="state">${finding ? html`<${Picture} finding=${finding} region=${region.value}/>` : html`<${Icon} name="plus" class="quiet"/>`}</span></a></li>`;
}

/** The part of a name that was typed, underlined. */
function Marked({ name, text }) {
  const at = text ? name.toLowerCase().indexOf(text.trim().toLowerCase()) : -1;
  if (at < 0) return name;
  const end = at + text.trim().length;
  return html`${name.slice(0, at)}<mark>${name.slice(at, end)}</mark>${name.slice(end)}`;
}

/** "Artemisia tridentata ssp. vaseyana" → "A. tridentata ssp. vaseyana" where it is long. */
function shortened(name) {
  return name.length > 24 ? name.replace(/^(\w)\w+/, '$1.') : name;
}

const formsOf = (here) => [...new Set(here.plants.map((plant) => plant.form))];
const formName = (form) => (has(`form.${form}`) ? t(`form.${form}`) : form.replaceAll('_', ' '));

function hitsFor(here, text, form) {
  const kept = (hit) => !form || hit.plant.form === form;
  if (text) return findPlants(here, text).filter(kept);
  if (form) return here.plants.map((plant) => ({ plant, by: plant.common })).filter(kept).sort((a, b) => (a.plant.common < b.plant.common ? -1 : 1));
  return lately(here).map((plant) => ({ plant, by: plant.common }));
}

/** Plants found on this phone's last site checks, the latest first: neighbours are likely. */
function lately(here) {
  const ids = [];
  for (const row of sites.value.slice(0, 6)) {
    if (row.id === site.value.id) continue;
    for (const one of row.findings) if (one.state === 'found' && one.plant_id && !ids.includes(one.plant_id)) ids.push(one.plant_id);
  }
  return ids.filter((id) => here.plant.has(id)).slice(0, SHOWN).map((id) => here.plant.get(id));
}

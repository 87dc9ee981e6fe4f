/** Sites: every record on this phone, by unit, each with its small column and its verdict tab. */
import { html } from 'htm/preact';
import { useState } from 'preact/hooks';
import { t, dayName } from './words.js';
import { go, region, sites } from './state.js';
import { oddsWords } from './say.js';
import { Foot } from './parts/foot.js';
import { Icon } from './parts/icon.js';
import { EdgeMini, EdgeShut } from './parts/edge_shut.js';
import { ModeKey } from './parts/bar.js';
import { VerdictTab } from './parts/tab.js';
import { Hills } from './parts/hills.js';
import { Invented, Untested } from './parts/table_marks.js';
import { rowCall, startSite } from './records.js';
import { start } from './start.js';

/** @returns the list of site checks, with search and a new one under the thumb */
export function Sites() {
  const [wanted, want] = useState(null);
  const here = region.value;
  const found = matching(sites.value, wanted);
  return html`<div class="page p-sites">
    <${EdgeShut} belts=${here.belts}/>
    <main class="acts"><div class="rolls">
      <div class="top"><${Hills}/><${ModeKey}/><h1 tabindex="-1">${t('sites.title')}</h1>
        <p>${t('sites.tables', { region: here.name, edition: here.edition })}<br/>${t('sites.kept', { n: sites.value.length })}</p>
        ${start.value.bookOnly && html`<p class="care">${t('app.probes')}</p>`}
        ${sites.value.some((row) => hasOdds(here, row)) && html`<${Untested}/>`}<${Invented}/></div>
      ${sites.value.length === 0 && html`<${Empty}/>`}
      ${wanted !== null && found.length === 0 && html`<p class="part quiet">${t('sites.none_found', { text: wanted })}</p>`}
      ${byUnit(found).map((unit) => html`<${Unit} key=${unit.key} unit=${unit} region=${here}/>`)}
      </div><div class="act">
        ${wanted === null
          ? html`<button type="button" class="btn icon-only" aria-label=${t('sites.search')} onClick=${() => want('')}><${Icon} name="find"/></button>`
          : html`<${SearchBox} value=${wanted} onWant=${want}/>`}
        ${wanted === null && html`<button type="button" class="btn go" onClick=${() => startSite()}><${Icon} name="plus"/>${t('sites.new')}</button>`}
      </div>
    </main>
    <${Foot} current="sites"/></div>`;
}

/** True where the row of a site check says how likely its zone is. */
const hasOdds = (here, row) => {
  const call = row.region_id === here.id ? rowCall(here, row) : null;
  return call?.answers > 0 && call.verdict === 'zone';
};

function Empty() {
  return html`<section class="part stack empty"><h2>${t('sites.empty')}</h2><p>${t('sites.empty_how')}</p>
    <ol class="steps">${['one', 'two', 'three'].map((step) => html`<li>${t(`sites.step_${step}`)}</li>`)}</ol></section>`;
}

function SearchBox({ value, onWant }) {
  const shut = () => onWant(null);
  return html`<div class="search"><${Icon} name="find"/><input type="search" aria-label=${t('sites.search')} value=${value}
    ref=${(box) => box?.focus()} onInput=${(event) => onWant(event.currentTarget.value)}/>
    <button type="button" aria-label=${t('sites.search_shut')} onClick=${shut}><${Icon} name="close"/></button></div>`;
}

function Unit({ unit, region: here }) {
  return html`<section><h2 class="day"><span>${unit.name}</span><span>${unit.rows.length}</span></h2>
    <ul>${unit.rows.map((row) => html`<${Row} key=${row.id} row=${row} region=${here}/>`)}</ul></section>`;
}

function Row({ row, region: here }) {
  const call = row.region_id === here.id ? rowCall(here, row) : null;
  const open = (event) => {
    event.preventDefault();
    go(`#/site/${row.id}/${row.findings.length ? 'zone' : 'place'}`);
  };
  return html`<li><a class="site" href=${`#/site/${row.id}/zone`} onClick=${open}>
    <${EdgeMini} region=${here} belief=${call?.answers ? call.belief : null}/>
    <span class="what"><b>${row.name || t('sites.unnamed')}</b><span>${rowWords(here, row, call)}</span></span>
    <${VerdictTab} call=${call?.answers ? call : null} zones=${here.zone}/></a></li>`;
}

function rowWords(here, row, call) {
  const verdict = row.region_id === here.id ? verdictLine(here, call) : t('sites.elsewhere');
  return row.unit_id ? t('sites.line', { role: t(`role.${row.role}`), verdict, day: dayName(row.date) }) : verdict;
}

/** One line for a verdict: "Mountain sage, about 9 in 10". */
export function verdictLine(here, call) {
  if (!call || call.answers === 0) return t('verdict.line_empty');
  const [first, second] = call.pair ?? [call.zone_id, call.next_zone_id];
  const zone = here.zone.get(first);
  const next = here.zone.get(second);
  return t(`verdict.line_${call.verdict}`, {
    zone: zone?.short ?? '', next: next?.short ?? '', odds: zone ? oddsWords(call.belief[zone.id]) : '',
  });
}

function byUnit(rows) {
  const units = new Map();
  for (const row of rows) {
    const key = row.unit_id ?? row.date;
    if (!units.has(key)) units.set(key, { key, name: row.unit_id ? row.unit_name || t('sites.unit_unnamed') : dayName(row.date), rows: [] });
    units.get(key).rows.push(row);
  }
  return [...units.values()];
}

function matching(rows, wanted) {
  if (!wanted) return rows;
  const text = wanted.toLowerCase();
  return rows.filter((row) => `${row.name} ${row.unit_name} ${row.observer} ${row.date} ${row.notes}`.toLowerCase().includes(text));
}

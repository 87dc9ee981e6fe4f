/** Reclaim: cautions first, then notes for this zone, this damage, this month; weeds; what to sow. */
import { html } from 'htm/preact';
import { monthName, sentence, t } from './words.js';
import { change, region, site } from './state.js';
import { Frame } from './parts/frame.js';
import { Choice } from './parts/choice.js';
import { Icon } from './parts/icon.js';
import { Later } from './parts/later.js';
import { monthsWords, YearWork } from './parts/year.js';
import { Source } from './parts/source.js';
import { Invented } from './parts/table_marks.js';
import { CalledStrip, standing } from './standing_zone.js';
import { mixOf, notesOf, weedsFor, windowsOf, yearOf } from './pack_reading.js';
import { carriedZone } from './records.js';

const SHEETS = {
  order: Later(() => import('./order.js'), 'Order'),
  test: Later(() => import('./success.js'), 'Success'),
  topsoil: Later(() => import('./topsoil.js'), 'Topsoil'),
};
const NOTES = ['topsoil', 'seedbed', 'method', 'season', 'protection', 'fails', 'fertiliser'];

/** @param {{parts: string[]}} props [] · ['order'] · ['test'] · ['topsoil'] */
export function Reclaim({ parts }) {
  const stand = standing();
  const Sheet = SHEETS[parts[0]];
  if (Sheet && stand) return html`<${Sheet} stand=${stand}/>`;
  const act = stand && html`<div class="act"><button type="button" class="btn icon-only" aria-label=${t('reclaim.print')} onClick=${() => print()}><${Icon} name="print"/></button>
      <a class="btn go" href=${`#/site/${site.value.id}/reclaim/order`}><${Icon} name="bag"/>${t('order.title')}</a></div>`;
  return html`<${Frame} tab="reclaim" act=${act} edge=${false} class="whole-width" line=${t('reclaim.line')}>
    <${CalledStrip} stand=${stand}/>${stand ? html`<${Notes} zone=${stand.zone}/>` : html`<${Cautions}/><${Defer}/>`}</${Frame}>`;
}

function Notes({ zone }) {
  const here = region.value;
  const record = site.value;
  const notes = notesOf(here, zone.id);
  const chosen = record.reclaim.disturbance ?? record.disturbance;
  const damages = here.disturbances.filter((one) => one.notes);
  const cell = notes?.by_disturbance?.[chosen];
  if (!notes) return html`<p class="part">${t('reclaim.no_notes')}</p>`;
  return html`<${Cautions} notes=${notes} zone=${zone}/><${Defer}/><${Carried} record=${record} zone=${zone}/>
    <section class="part"><${Choice} label=${t('reclaim.damage')} options=${damages.map((one) => ({ value: one.id, label: one.name }))} value=${chosen} onPick=${(value) => change({ reclaim: { ...record.reclaim, disturbance: value } }, t('undo.disturbance'))}/></section>
    <${When} zone=${zone} record=${record}/>
    <section class="part"><dl class="notes">${cell ? html`<dt>${t('reclaim.do')}</dt><dd>${cell.do}</dd><dt>${t('reclaim.avoid')}</dt><dd>${cell.avoid}</dd>` : html`<dt>${t('reclaim.do')}</dt><dd class="quiet">${t('reclaim.pick_damage')}</dd>`}
      ${NOTES.filter((name) => notes[name]).map((name) => html`<dt key=${name}>${t(`reclaim.${name}`)}</dt><dd>${notes[name]}</dd>`)}</dl><${Source} what=${t('reclaim.these')} region=${here} keys=${[...(notes.sources ?? []), ...(cell?.sources ?? [])]}/></section>
    <${Sow} zone=${zone}/><${Weeds} zone=${zone}/><${Life} notes=${notes}/>`;
}

/** What can kill, of the whole region while no zone is called; then of this zone. */
function Cautions({ notes, zone }) {
  const here = region.value;
  const now = here.texts.region.cautions.filter((one) => one.level === 'deadly' && (!zone || !one.zones || one.zones.includes(zone.id)));
  return html`<ul class="cautions" aria-label=${t('reclaim.cautions')}>${notes?.cautions && html`<li><${Icon} name="warn"/><span>${notes.cautions}</span></li>`}
    ${now.map((one) => html`<li key=${one.text}><${Icon} name="warn"/><span>${one.text}${one.when ? html` <span class="quiet">${t('reclaim.caution_when', { when: one.when })}</span>` : ''}</span></li>`)}</ul>`;
}

function Defer() {
  return html`<section class="part tight"><p class="small">${t('reclaim.defer')}</p></section>`;
}

/** What the unit's edges say, where there are any. */
function Carried({ record, zone }) {
  if (!record.unit_id) return null;
  const here = region.value;
  const carried = carriedZone(here, record.unit_id);
  const names = carried.zone_ids.map((id) => here.zone.get(id).short).join(', ');
  const differs = carried.state === 'carried' && carried.zone_id !== zone.id;
  return html`<section class="part tight"><p class="small"><b>${record.unit_name}</b> ${t(`carried.${carried.state}`, { zone: names, sides: carried.sides })} ${differs ? t('carried.other') : ''}</p></section>`;
}

function When({ zone, record }) {
  const here = region.value;
  const windows = windowsOf(here, zone.id);
  const year = yearOf(here, zone, record.place.height_m);
  const rows = [
    year && { label: t('year.growing'), months: year.growing, letter: null },
    windows.sow_months?.length && { label: t('year.sow'), months: windows.sow_months, letter: zone.letter },
    windows.plant_months?.length && { label: t('year.plant'), months: windows.plant_months, letter: zone.letter },
    windows.keep_off_months?.length && { label: t('year.keep_off'), months: windows.keep_off_months, letter: null },
  ].filter(Boolean);
  return html`<section class="part"><h2 class="sides">${t('reclaim.when')}<span class="mine">${Number(record.date.slice(8))} ${monthName(record.month)}</span></h2>
    <${YearWork} rows=${rows} today=${record.date}/><p class="small">${sowNow(windows.sow_months ?? [], record.month)}</p></section>`;
}

function sowNow(months, month) {
  if (months.length === 0) return t('reclaim.no_sowing');
  if (months.includes(month)) return t('reclaim.sow_now', { months: monthsWords(months) });
  return t('reclaim.not_now', { month: monthName(month), months: monthsWords(months) });
}

function Sow({ zone }) {
  const here = region.value;
  const mix = mixOf(here, zone.id);
  if (!mix) return null;
  return html`<section class="part"><h2 class="sides">${t('reclaim.mix')}<span class="label">${t('order.per_m2')}</span></h2><${Invented}/>
    ${mix.plants.length === 0 && html`<p>${t('reclaim.no_seed')}</p>`}
    <ul class="plain-list">${mix.plants.map(({ id, seeds_m2 }) => html`<li key=${id} class="two-sides"><span>${here.plant.get(id).common}</span><b>${seeds_m2}</b></li>`)}</ul>
    ${mix.plants.length > 0 && html`<p class="small">${t('reclaim.rate_is', { method: t(`method.${mix.method}`) })} ${mix.other_method ? t('reclaim.other', { other: sentence(mix.other_method) }) : ''}</p>`}
    <${Source} what=${t('reclaim.these_rates')} region=${here} keys=${mix.sources ?? []}/>
    <p class="deep"><a class="btn" href=${`#/site/${site.value.id}/reclaim/topsoil`}><${Icon} name="pit"/>${t('topsoil.title')}</a><a class="btn" href=${`#/site/${site.value.id}/reclaim/test`}><${Icon} name="test"/>${t('success.title')}</a></p></section>`;
}

function Weeds({ zone }) {
  const weeds = weedsFor(region.value, zone);
  if (weeds.length === 0) return null;
  return html`<section class="part"><h2>${t('reclaim.weeds')}</h2><ul class="plain-list">${weeds.map(({ plant, here }) => html`<li key=${plant.id}><a class="two-sides" href=${`#/book/plant/${plant.id}`}><span>${plant.common} <i class="latin">${plant.scientific}</i></span><span class="label">${t(here ? 'reclaim.weed_here' : 'reclaim.weed_near')}</span></a></li>`)}</ul></section>`;
}

function Life({ notes }) {
  const parts = [...Object.entries(notes.wildlife ?? {}), ...Object.entries(notes.soil_life ?? {})];
  if (parts.length === 0) return null;
  return html`<section class="part"><h2>${t('reclaim.life')}</h2><dl class="notes">${parts.map(([name, text]) => html`<dt key=${name}>${t(`life.${name}`)}</dt><dd>${text}</dd>`)}</dl></section>`;
}

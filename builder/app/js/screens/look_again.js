/** Look again: two more spots and the stand question part an edge, a mosaic and a zone. */
import { html } from 'htm/preact';
import { callThree } from '../core/index.js';
import { t } from './words.js';
import { call, change, region, say, site, sites } from './state.js';
import { keptOfThree } from './keep.js';
import { startSpot } from './records.js';
import { verdictLine } from './sites.js';
import { Choice } from './parts/choice.js';
import { Icon } from './parts/icon.js';

const STANDS = ['one_kind', 'changes_near', 'patches'];

/** Site checks begun as spots of this one, first begun first. */
export function spotsOf(record) {
  return (record.spots ?? []).map((id) => sites.value.find((row) => row.id === id)).filter(Boolean);
}

/** @returns the part that sends the person to two spots and reads all three looks together */
export function LookAgain() {
  const record = site.value;
  const spots = spotsOf(record);
  const ready = spots.filter((row) => row.findings.length > 0);
  const start = (way) => startSpot(t(`again.name_${way}`, { name: record.name }));
  return html`<section class="part stack"><h2><${Icon} name="place"/>${t('again.title')}</h2><p>${t('again.how')}</p>
    <${Choice} label=${t('again.stand')} options=${STANDS.map((value) => ({ value, label: t(`again.${value}`) }))} value=${record.stand ?? null} onPick=${(stand) => change({ stand }, t('undo.stand'))}/>
    <div class="deep">${spots.length < 2 && html`<button type="button" class=${`btn ${spots.length ? '' : 'go'}`} onClick=${() => start('up')}><${Icon} name="place"/>${t('again.up')}</button><button type="button" class="btn" onClick=${() => start('down')}>${t('again.down')}</button>`}</div>
    ${spots.length > 0 && html`<ul class="next">${spots.map((row) => html`<li key=${row.id}><a href=${`#/site/${row.id}/plants`}><${Icon} name="place"/><span>${row.name}: ${t('again.answered', { n: row.findings.length })}</span></a></li>`)}</ul>`}
    ${ready.length >= 2 && html`<${Together} record=${record} spots=${ready}/>`}</section>`;
}

function Together({ record, spots }) {
  const three = callThree(region.value.pack, record, spots[0], spots[1], record.stand ?? null);
  const kept = record.call?.looks === 3 && record.call.verdict === three.verdict && record.call.zone_id === three.zone_id;
  const keep = () => {
    change({ call: keptOfThree(call.value, three), overruled: null }, t('undo.kept'));
    say(t('keep.done'));
  };
  return html`<div class="three"><p class="label">${t('again.together')}</p><p class="verdict">${verdictLine(region.value, { ...three, answers: 1 })}</p>
    <div class="deep">${kept ? html`<span class="kept"><${Icon} name="check"/>${t('keep.is_kept')}</span>` : html`<button type="button" class="btn go" onClick=${keep}>${t('again.keep')}</button>`}</div></div>`;
}

/** The open edge with its verdict in words, as a page of its own or beside another page. */
import { html } from 'htm/preact';
import { signal } from '@preact/signals';
import { sentence, t } from './words.js';
import { call, region, site } from './state.js';
import { oddsWords } from './say.js';
import { heightMark } from './height_mark.js';
import { EdgeEven, EdgeOpen } from './parts/edge_open.js';
import { Reasons } from './parts/reasons.js';
import { isUntested, Untested } from './parts/table_marks.js';
import { Keep } from './keep.js';

const beside = signal({ site: null, id: null });

/** The belt set beside the leader: the person's pick, else the runner-up. */
export function rivalOf(answer) {
  const picked = beside.value.site === site.value.id ? beside.value.id : null;
  return picked && picked !== answer.zone_id ? picked : answer.next_zone_id;
}

export const setBeside = (id) => { beside.value = { site: site.value.id, id }; };

/** The open edge for the present call. */
export function Edge() {
  const here = region.value;
  const answer = call.value;
  const asked = answer.answers > 0;
  const rival = rivalOf(answer);
  if (!asked || answer.verdict === 'thin') {
    return html`<section class="part tight lead0"><p class="verdict">${t(asked ? 'verdict.thin' : 'verdict.empty')}</p><p class="small">${t(asked ? 'verdict.thin_why' : 'verdict.empty_why')}</p></section>
      <${EdgeEven} region=${here} call=${answer} asked=${asked} mark=${heightMark(here, site.value)} rival=${rival} onRival=${setBeside}/>
      ${asked && html`<${OffSlope} region=${here} answer=${answer}/>`}`;
  }
  return html`<${EdgeOpen} region=${here} call=${answer} rival=${rival} onRival=${setBeside}>
    ${answer.verdict === 'zone' && html`<${Called} region=${here} answer=${answer}/>`}
    ${answer.verdict === 'misfit' && html`<${Misfit} region=${here}/>`}</${EdgeOpen}>`;
}

function OffSlope({ region: here, answer }) {
  const off = here.lenses.filter((zone) => answer.belief[zone.id] >= 0.01).sort((a, b) => answer.belief[b.id] - answer.belief[a.id]);
  if (off.length === 0) return null;
  return html`<p class="part tight small">${t('zone.off_slope', { list: off.map((zone) => `${zone.short} ${Math.round(answer.belief[zone.id] * 100)}`).join(', ') })}</p>`;
}

function Called({ region: here, answer }) {
  const zone = here.zone.get(answer.zone_id);
  const odds = oddsWords(answer.belief[zone.id]);
  return html`<p class="odds">${isUntested() ? html`${t('verdict.by_tables')} <b>${odds}</b>` : html`<b>${sentence(odds)}</b>`} ${t('verdict.odds', { zone: zone.letter })}</p><${Untested}/>
    <p class="gist">${zone.one_line}</p><${Keep}/>`;
}

function Misfit({ region: here }) {
  return html`<h2>${t('verdict.misfit', { n: here.zones.length })}</h2><p class="small">${t('verdict.misfit_why')}</p>`;
}

/** Edge and reasons, for the left pane. */
export function ZonePane() {
  const answer = call.value;
  return html`<${Edge}/>${answer.answers > 0 && html`<${Reasons} leader=${answer.zone_id} rival=${rivalOf(answer)} onRival=${setBeside}/>`}`;
}

/** Why this belt and not that one: a plumb line, solid bars for the leader, hollow ones for the
 *  rival, points that add up to the last row. */
import { html } from 'htm/preact';
import { useState } from 'preact/hooks';
import { reasonsBetween } from '../../core/index.js';
import { t, number } from '../words.js';
import { change, region, site } from '../state.js';
import { coverWords } from '../say.js';
import { Icon } from './icon.js';
import { Tab } from './tab.js';

const SHOWN = 7;
const LINES = ['implied', 'height', 'area', 'drag'];

/** @param {{leader: string, rival: string, onRival: (id: string) => void}} props */
export function Reasons({ leader, rival, onRival }) {
  const [all, showAll] = useState(false);
  const here = region.value;
  const a = here.zone.get(leader);
  const b = here.zone.get(rival);
  const { difference_cb: total, reasons } = reasonsBetween(here.pack, site.value, leader, rival);
  const answers = reasons.filter((one) => !LINES.includes(one.kind)).sort((x, y) => Math.abs(y.points_cb) - Math.abs(x.points_cb));
  const shown = all || answers.length <= SHOWN + 1 ? answers : answers.slice(0, SHOWN);
  const rest = answers.slice(shown.length);
  const lines = reasons.filter((one) => LINES.includes(one.kind));
  const widest = Math.max(1, ...reasons.map((one) => Math.abs(one.points_cb)));
  return html`<section class="part" aria-label=${t('reasons.title', { leader: a.short, rival: b.short })}>
    <h2>${t('reasons.why')} <${Tab} zone=${a} size="small"/> ${t('reasons.not')} <${Tab} zone=${b} size="small"/></h2>
    <table class="rise"><thead><tr><th>${t('reasons.saw')}</th><th class="mid">${t('reasons.sides', { leader: a.letter, rival: b.letter })}</th><th class="end">${t('reasons.points')}</th></tr></thead>
    <tbody>${[...shown, ...lines].map((one) => html`<${Row} key=${`${one.kind} ${one.id}`} reason=${one} widest=${widest} region=${here}/>`)}
      ${rest.length > 0 && html`<tr><td colspan="2"><button type="button" class="btn plain left" onClick=${() => showAll(true)}>${t('reasons.smaller', { n: rest.length })}</button></td><td class="n">${points(sum(rest))}</td></tr>`}
      <tr><td>${t('reasons.together')}</td><td class="way"></td><td class="n">${points(total)}</td></tr></tbody></table>
    <${Struck} region=${here}/><${Beside} leader=${leader} rival=${rival} onRival=${onRival} region=${here}/></section>`;
}

const sum = (rows) => rows.reduce((total, one) => total + one.points_cb, 0);
const points = (cb) => `${cb > 0 ? '+' : cb < 0 ? '−' : ''}${number(Math.abs(cb) / 10, 1)}`;

function Row({ reason, widest, region: here }) {
  const { name, answer } = words(here, reason);
  const strikes = reason.kind === 'implied' || reason.kind === 'rule';
  const strike = () => change({ struck: [...site.value.struck, reason.kind === 'rule' ? reason.id : 'implied'] }, t('undo.struck', { name }));
  return html`<tr><td>${name}${answer && html`<small class="mine">${answer}</small>`}${strikes && html`<button type="button" class="link small" onClick=${strike}>${t('reasons.strike')}</button>`}</td>
    <td class="way"><${Bar} share=${reason.points_cb / widest}/></td><td class="n">${points(reason.points_cb)}</td></tr>`;
}

function Bar({ share }) {
  const width = Math.abs(share) * 46;
  const bar = share >= 0 ? html`<rect class="for" x="50" y="3" width=${width} height="16"/>` : html`<rect class="against" x=${50 - width} y="3.8" width=${width} height="14.4"/>`;
  return html`<svg viewBox="0 0 100 22" preserveAspectRatio="none" aria-hidden="true">${bar}<path class="plumb" d="M50 -14v50"/></svg>`;
}

function words(here, reason) {
  if (reason.kind === 'plant' || reason.kind === 'group') {
    const name = reason.kind === 'plant' ? here.plant.get(reason.id).common : here.group.get(reason.id).name;
    const answer = reason.answer === 'not_found' ? t('finding.none') : reason.answer === 'found' ? t('finding.there') : coverWords(here, reason.answer);
    return { name, answer };
  }
  if (reason.kind === 'question') {
    const question = here.question.get(reason.id);
    return { name: question.ask, answer: question.answers.find((one) => one.value === reason.answer)?.label };
  }
  if (reason.kind === 'rule') return { name: here.texts.rules?.[reason.id]?.why ?? t('reasons.rule'), answer: null };
  return { name: t(`reasons.${reason.kind}`), answer: null };
}

/** Lines the person has struck out, each with a way back. */
function Struck({ region: here }) {
  const { struck } = site.value;
  if (struck.length === 0) return null;
  const name = (id) => (id === 'implied' ? t('reasons.implied') : here.texts.rules?.[id]?.why ?? t('reasons.rule'));
  return html`<ul class="struck">${struck.map((id) => html`<li key=${id}><s>${name(id)}</s><button type="button" class="btn plain" onClick=${() => change({ struck: struck.filter((one) => one !== id) }, t('undo.put_back'))}><${Icon} name="undo"/>${t('reasons.put_back')}</button></li>`)}</ul>`;
}

/** Any belt can be set beside the leader. */
function Beside({ leader, rival, onRival, region: here }) {
  return html`<p class="small quiet">${t('reasons.beside', { leader: here.zone.get(leader).letter })}</p>
    <div class="letters">${here.zones.filter((zone) => zone.id !== leader).map((zone) => html`<button key=${zone.id} type="button" aria-pressed=${String(zone.id === rival)} aria-label=${zone.short} onClick=${() => onRival(zone.id)}><${Tab} zone=${zone} size="small"/></button>`)}</div>`;
}

/** Keeping a call, or saying that it is not right: both stay on the record, with the reason. */
import { html } from 'htm/preact';
import { useState } from 'preact/hooks';
import { stamp } from '../store/index.js';
import { t } from './words.js';
import { call, change, region, say, site } from './state.js';
import { Choice } from './parts/choice.js';
import { Icon } from './parts/icon.js';

const KEPT = ['verdict', 'zone_id', 'next_zone_id', 'pair', 'belief', 'zone_share', 'fit', 'finds_cb', 'answers', 'look_again', 'reasons', 'difference_cb'];

/** What is stored of a call: the answer and the reasons, stamped. */
export function keptCall(answer) {
  return { ...Object.fromEntries(KEPT.map((key) => [key, answer[key]])), kept_at: stamp() };
}

/** What three looks together say, kept over the one look's own answer and reasons. */
export function keptOfThree(answer, three) {
  return { ...keptCall(answer), ...three, looks: 3 };
}

/** True where the answers given since still lead to the kept call. */
function stands(kept, answer) {
  if (kept.looks === 3) return kept.answers === answer.answers;
  return kept.verdict === answer.verdict && kept.zone_id === answer.zone_id && kept.answers === answer.answers && kept.belief[kept.zone_id] === answer.belief[kept.zone_id];
}

/** The keys under a verdict. @param {{label?: string}} props */
export function Keep({ label = t('keep.key') }) {
  const [wrong, setWrong] = useState(false);
  const { call: kept, overruled } = site.value;
  const current = kept && stands(kept, call.value);
  const keep = () => {
    change({ call: keptCall(call.value), overruled: null }, t('undo.kept'));
    say(t('keep.done'));
  };
  if (wrong) return html`<${Overrule} onShut=${() => setWrong(false)}/>`;
  return html`${kept && !current && html`<p class="small">${t('keep.changed')}</p>`}
    ${overruled && html`<p class="hint"><${Icon} name="pen"/><span class="mine">${t('keep.overruled', { zone: region.value.zone.get(overruled.zone_id)?.short ?? t('keep.none'), reason: overruled.reason })}</span></p>`}
    <div class="deep">${current
      ? html`<span class="kept"><${Icon} name="check"/>${t('keep.is_kept')}</span><a class="btn" href=${`#/site/${site.value.id}/production`}>${t('keep.on')}</a>`
      : html`<button type="button" class="btn go" onClick=${keep}>${kept ? t('keep.again') : label}</button>`}
      <button type="button" class=${`btn ${current ? 'plain' : ''}`} onClick=${() => setWrong(true)}>${t('keep.wrong')}</button></div>`;
}

/** Another zone, with the reason; the key's own call stays beside it. */
function Overrule({ onShut }) {
  const old = site.value.overruled;
  const [zoneId, setZone] = useState(old?.zone_id ?? null);
  const [reason, setReason] = useState(old?.reason ?? '');
  const here = region.value;
  const may = zoneId && reason.trim().length > 0;
  const done = () => {
    change({ call: keptCall(call.value), overruled: { zone_id: zoneId, reason: reason.trim() } }, t('undo.overruled'));
    say(t('keep.overruled_done'));
    onShut();
  };
  return html`<div class="overrule stack"><${Choice} label=${t('keep.which')} options=${here.zones.map((zone) => ({ value: zone.id, label: `${zone.letter} ${zone.short}` }))} value=${zoneId} onPick=${setZone}/>
    <label class="field"><span>${t('keep.reason')}</span><textarea rows="2" value=${reason} onInput=${(event) => setReason(event.currentTarget.value)}></textarea></label>
    ${!may && html`<p class="small quiet">${t('keep.needs')}</p>`}
    <div class="deep">${may && html`<button type="button" class="btn go" onClick=${done}>${t('keep.overrule')}</button>`}<button type="button" class="btn" onClick=${onShut}>${t('confirm.no')}</button></div></div>`;
}

/** Ask me: the plant or ground question that would help most now, with its answers under the thumb. */
import { html } from 'htm/preact';
import { useEffect, useRef } from 'preact/hooks';
import { signal } from '@preact/signals';
import { sentence, t } from './words.js';
import { call, lastChange, region, say, site } from './state.js';
import { enter, findingOf } from './findings.js';
import { answerQuestion } from './question.js';
import { oddsWords } from './say.js';
import { CoverKeys } from './parts/cover_keys.js';
import { Danger, PlantCard } from './parts/plant_card.js';
import { Icon } from './parts/icon.js';
import { UndoLine } from './parts/undo_line.js';
import { Safety } from './place_digging.js';
import { SearchedAll } from './searched.js';

/** Prompts put aside on this page, by site check: "ask me another". */
const aside = signal({ id: null, ids: [] });
const asideFor = (record) => (aside.value.id === record.id ? aside.value.ids : []);

/** @param {{root: string}} props */
export function Ask({ root }) {
  const record = site.value;
  const skipped = asideFor(record);
  const prompts = call.value.prompts.filter((one) => !skipped.includes(one.id));
  const prompt = prompts[0];
  const skip = () => { aside.value = { id: record.id, ids: [...skipped, prompt.id] }; };
  if (!prompt) return html`<${Enough} root=${root} again=${skipped.length > 0 ? () => { aside.value = { id: null, ids: [] }; } : null}/>`;
  return prompt.kind === 'plant'
    ? html`<${AskPlant} plant=${region.value.plant.get(prompt.id)} skip=${skip} root=${root}/>`
    : html`<${AskGround} question=${region.value.question.get(prompt.id)} skip=${skip}/>`;
}

function pairOf() {
  const { zone } = region.value;
  return call.value.answers ? [zone.get(call.value.zone_id), zone.get(call.value.next_zone_id)] : [];
}

function AskPlant({ plant, skip, root }) {
  const here = region.value;
  const told = useNewPrompt(plant.id, `${t('plants.look_for')}: ${plant.common}`);
  const sure = call.value.sure ? t('plants.sure_already', { odds: sentence(oddsWords(call.value.belief[call.value.zone_id])) }) : null;
  return html`<${Danger} plant=${plant}/><div class="told" ref=${told}>
      <${PlantCard} plant=${plant} why=${t('plants.look_for')} pair=${pairOf()}/>
      ${call.value.notes.dead_counts && plant.layer === 'tree' && html`<p class="hint"><${Icon} name="plants"/><span>${t('notes.dead_counts')}</span></p>`}
      ${sure && html`<p class="hint"><${Icon} name="zone"/><span>${sure} <a class="link" href=${root.replace(/plants$/, 'zone')}>${t('plants.to_zone')}</a></span></p>`}
      <div class="push"></div><${UndoLine}/></div>
    <div class="answer"><${CoverKeys} region=${here} finding=${findingOf(site.value, plant.id)} onAnswer=${(answer) => enter(here, plant, answer)}/>
      <div class="under"><button type="button" class="btn plain" onClick=${() => enter(here, plant, { state: 'cant_tell' })}>${t('plants.cant_tell')}</button>
        <button type="button" class="btn plain" onClick=${skip}>${t('plants.another')}<${Icon} name="next"/></button></div></div>`;
}

function AskGround({ question, skip }) {
  const record = site.value;
  const pick = (value) => answerQuestion(question, value);
  const told = useNewPrompt(question.id, question.ask);
  return html`<div class="told" ref=${told}><div class="why"><span class="label">${t(question.digs_cm ? 'plants.dig_next' : 'plants.look_at')}</span></div>
      <div class="title"><div><h2>${question.ask}</h2></div>${question.digs_cm > 0 && html`<${Icon} name="dig" class="big"/>`}</div>
      ${question.why && html`<p class="hint"><${Icon} name="zone"/><span>${question.why}</span></p>`}
      ${question.digs_cm > 0 && html`<${Safety} record=${record}/>`}
      <div class="push"></div><${UndoLine}/></div>
    <div class="answer"><div class="how"></div><div class="grounds">${question.answers.map((one) => html`<button key=${one.value} type="button" class="cover" onClick=${() => pick(one.value)}>${sentence(one.label)}</button>`)}</div>
      <div class="under"><button type="button" class="btn plain" onClick=${() => pick('cant_tell')}>${t(question.digs_cm ? 'question.not_dug' : 'question.cant_tell')}</button>
        <button type="button" class="btn plain" onClick=${skip}>${t('plants.another')}<${Icon} name="next"/></button></div></div>`;
}

/** Nothing more to ask: on to the Zone page, or say that the whole plot was searched. */
function Enough({ root, again }) {
  const sure = call.value.sure;
  return html`<div class="told stack"><p class="label">${t('plants.done_label')}</p><h2 class="verdict">${t(sure ? 'plants.enough' : 'plants.no_more')}</h2>
      <p>${t(sure ? 'plants.enough_why' : 'plants.no_more_why')}</p><${SearchedAll}/><div class="push"></div><${UndoLine}/></div>
    <div class="answer"><div class="deep"><a class="btn go wide" href=${root.replace(/plants$/, 'zone')}><${Icon} name="zone"/>${t('plants.to_zone')}</a>
      ${again && html`<button type="button" class="btn wide" onClick=${again}>${t('plants.again')}</button>`}</div></div>`;
}

/** A new prompt stands at its top and is read out after the answer that led to it. The page is not
 *  built anew for it: that would cost more than the answer. */
function useNewPrompt(id, words) {
  const told = useRef(null);
  useEffect(() => {
    told.current.scrollTop = 0;
    const before = lastChange.value?.told;
    say(before ? `${before}. ${words}` : words);
  }, [id]);
  return told;
}

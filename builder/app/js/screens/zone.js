/** Zone: the open edge, what the verdict asks for next, then the reasons. */
import { html } from 'htm/preact';
import { t } from './words.js';
import { call, region, site } from './state.js';
import { wide } from './wide.js';
import { Frame } from './parts/frame.js';
import { Reasons } from './parts/reasons.js';
import { Tables } from './parts/source.js';
import { Edge, rivalOf, setBeside } from './zone_pane.js';
import { VerdictPart } from './zone_next.js';
import { LookAgain } from './look_again.js';

/** @returns the Zone page of the open site check */
export function Zone() {
  const answer = call.value;
  const asked = answer.answers > 0;
  return html`<${Frame} tab="zone" edge=${false} class="whole-width" line=${t('zone.line', { n: answer.answers })}>
    ${!wide.value && html`<${Edge}/>`}
    <${VerdictPart} answer=${answer} asked=${asked}/>
    ${asked && answer.look_again && html`<${LookAgain}/>`}
    ${asked && !wide.value && html`<${Reasons} leader=${answer.zone_id} rival=${rivalOf(answer)} onRival=${setBeside}/>`}
    <${Notes} answer=${answer}/>
    <${Tables} region=${region.value} record=${site.value}/></${Frame}>`;
}

/** What the ground answers did to the key, so that no rule acts unseen. */
function Notes({ answer }) {
  const notes = Object.entries(answer.notes).filter(([name, on]) => on && name !== 'second_call').map(([name]) => name);
  if (notes.length === 0) return null;
  return html`<section class="part"><h2>${t('notes.title')}</h2><ul class="plain-list">${notes.map((name) => html`<li key=${name}>${t(`notes.${name}`)}</li>`)}</ul></section>`;
}

/** Plants: what covers most first, then what the key asks for; or find any plant; or what is listed. */
import { html } from 'htm/preact';
import { t } from './words.js';
import { call, region, site } from './state.js';
import { Frame } from './parts/frame.js';
import { Later } from './parts/later.js';
import { PlantTabs } from './parts/plant_tabs.js';
import { Ask } from './ask.js';
import { AskNamed } from './ask_named.js';
import { AnswerPage } from './answer.js';
import { Listed } from './listed.js';

const Find = Later(() => import('./find.js'), 'Find');

/** @param {{parts: string[]}} props [] ask · ['find'] · ['listed'] · ['enter', id] · ['name', id] */
export function Plants({ parts }) {
  const record = site.value;
  const line = t('plants.line', { n: call.value.answers });
  const [view = 'ask', id] = parts;
  const root = `#/site/${record.id}/plants`;
  if (view === 'enter' || view === 'name') {
    const thing = region.value.plant.get(id) ?? region.value.group.get(id);
    return html`<${Frame} tab="plants" line=${line} class="ask-page" back=${`${root}/find`}>
      <${AnswerPage} key=${id} thing=${thing} naming=${view === 'name'} root=${root}/></${Frame}>`;
  }
  if (view === 'find') {
    return html`<${Frame} tab="plants" line=${line} class="find-page" back=${root}><${Find} root=${root} naming=${false}/><${PlantTabs} current="find" root=${root}/></${Frame}>`;
  }
  if (view === 'listed') {
    return html`<${Frame} tab="plants" line=${line} class="list-page" back=${root}><${Listed} root=${root}/><${PlantTabs} current="listed" root=${root}/></${Frame}>`;
  }
  const naming = view === 'first' || (wantsNames() && view !== 'next');
  return html`<${Frame} tab="plants" line=${line} class=${naming ? 'find-page' : 'ask-page'}>
    ${naming ? html`<${AskNamed} root=${root}/>` : html`<${Ask} root=${root}/>`}
    <${PlantTabs} current="ask" root=${root}/></${Frame}>`;
}

/** Up to three plants are named first, unless an answer of another kind has been given already. */
function wantsNames() {
  return call.value.name_more > 0 && !site.value.findings.some((finding) => !finding.named);
}

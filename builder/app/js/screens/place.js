/** Place: where this is, what was done to the ground, and what it says before and after digging. */
import { html } from 'htm/preact';
import { t, dayName } from './words.js';
import { call, change, region, site } from './state.js';
import { Frame } from './parts/frame.js';
import { Choice } from './parts/choice.js';
import { Icon } from './parts/icon.js';
import { Height } from './place_height.js';
import { Wheel } from './parts/wheel.js';
import { Header } from './place_header.js';
import { Digging } from './place_digging.js';
import { Question } from './question.js';
import { Photos } from './place_photos.js';

/** @returns the Place page of the open site check */
export function Place() {
  const here = region.value;
  const record = site.value;
  const open = here.questions.filter((question) => !question.digs_cm);
  const done = open.filter((question) => question.kind === 'state');
  const around = open.filter((question) => question.kind !== 'state');
  const digs = here.questions.filter((question) => question.digs_cm);
  const act = html`<div class="act"><a class="btn go" href=${`#/site/${record.id}/plants`}><${Icon} name="plants"/>${t(call.value.answers ? 'place.on' : 'place.start')}</a></div>`;
  return html`<${Frame} tab="place" act=${act} line=${t('place.line', { day: dayName(record.date), role: t(`role.${record.role}`) })}>
    <${Height} region=${here} record=${record}/>
    <section class="part"><h2>${t('place.facing')}</h2><${Wheel} place=${record.place} onPlace=${(place) => change({ place })}/></section>
    <section class="part"><h2>${t('place.damage')}</h2>
      <${Disturbance} region=${here} record=${record}/>
      ${done.map((question) => html`<${Question} key=${question.id} question=${question} value=${record.questions[question.id]}/>`)}</section>
    ${around.length > 0 && html`<section class="part"><h2>${t('place.around')}</h2>
      ${around.map((question) => html`<${Question} key=${question.id} question=${question} value=${record.questions[question.id]}/>`)}</section>`}
    ${digs.length > 0 && html`<section class="part"><h2><${Icon} name="dig"/>${t('place.dig')}</h2><${Digging} questions=${digs} record=${record}/>
      <p class="deep"><a class="btn" href="#/book/soil"><${Icon} name="pit"/>${t('feel.title')}</a></p></section>`}
    <${Header} record=${record} region=${here}/>
    <${Photos} record=${record}/>
  </${Frame}>`;
}

function Disturbance({ region: here, record }) {
  const options = here.disturbances.map((one) => ({ value: one.id, label: one.name }));
  return html`<${Choice} label=${t('place.disturbance')} options=${options} value=${record.disturbance}
    onPick=${(value) => change({ disturbance: value === record.disturbance ? null : value }, t('undo.disturbance'))}/>`;
}

/** One plant or group that the person picked: its card and the answer keys. */
import { html } from 'htm/preact';
import { lookAlikes, visible } from '../core/index.js';
import { t } from './words.js';
import { call, go, region, site } from './state.js';
import { enter, findingOf, leaveOut } from './findings.js';
import { CoverKeys } from './parts/cover_keys.js';
import { Danger, PlantCard } from './parts/plant_card.js';
import { Icon } from './parts/icon.js';
import { UndoLine } from './parts/undo_line.js';

/** @param {{thing: object, naming: boolean, root: string}} props naming: one of the plants that cover most */
export function AnswerPage({ thing, naming, root }) {
  const here = region.value;
  const record = site.value;
  const old = findingOf(record, thing.id);
  const group = !here.plant.has(thing.id);
  const given = (answer) => {
    enter(here, thing, naming && answer.state === 'found' ? { ...answer, named: old?.named ?? call.value.named + 1 } : answer);
    go(naming ? root : `${root}/find`, true);
  };
  return html`<${Danger} plant=${thing}/><div class="told">
      ${group ? html`<${GroupCard} group=${thing} region=${here}/>` : html`<${PlantCard} plant=${thing} why=${t(naming ? 'plants.covers_most' : 'plants.picked')}/>`}
      ${!group && visible(here.pack, record, thing.id) === 'gone' && html`<p class="hint"><${Icon} name="plants"/><span>${t('listed.off_season_why')}</span></p>`}
      ${!group && html`<${Guard} plant=${thing} region=${here} root=${root}/>`}
      <div class="push"></div><${UndoLine}/></div>
    <div class="answer"><${CoverKeys} region=${here} finding=${old} none=${!naming} onAnswer=${given}/>
      <div class="under"><button type="button" class="btn plain" onClick=${() => given({ state: 'cant_tell' })}>${t('plants.cant_tell')}</button>
        ${old ? html`<button type="button" class="btn plain" onClick=${() => { leaveOut(here, old); go(root, true); }}>${t('plants.leave_out')}</button>`
          : html`<a class="btn plain" href=${root}>${t('plants.back_to_asking')}<${Icon} name="next"/></a>`}</div></div>`;
}

/** Where a plant has doubles, "some of these" stands one tap away. */
function Guard({ plant, region: here, root }) {
  const { plants, groups } = lookAlikes(here.pack, plant.id);
  if (groups.length === 0 && plants.length === 0) return null;
  return html`<div class="guard"><p class="label">${t('plants.not_sure')}</p><div class="chips">
    ${groups.map((id) => html`<a class="chip" href=${`${root}/enter/${id}`}>${here.group.get(id).name}</a>`)}
    ${plants.map((id) => html`<a class="chip" href=${`${root}/enter/${id}`}>${here.plant.get(id).common}</a>`)}</div></div>`;
}

function GroupCard({ group, region: here }) {
  const members = group.members.map((at) => here.plants[at]);
  return html`<div class="why"><span class="label">${t('plants.some')}</span></div><div class="title"><div><h2>${group.name}</h2></div></div>
    <p class="marks">${t('plants.some_why')}</p><ul class="members">${members.map((plant) => html`<li>${plant.common} <i class="latin">${plant.scientific}</i></li>`)}</ul>`;
}

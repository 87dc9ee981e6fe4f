/** One plant as it is told before an answer: caution first where it can hurt, then name, marks,
 *  what it is not. */
import { html } from 'htm/preact';
import { t } from '../words.js';
import { harmsPeople } from '../region.js';
import { Form, Icon } from './icon.js';
import { Tab } from './tab.js';

/** @param {{plant: object}} props the strip that comes before the name of a plant that can hurt */
export function Danger({ plant }) {
  if (!harmsPeople(plant)) return null;
  const worst = plant.cautions.filter((one) => one.who === 'people' && one.level !== 'care');
  return html`<div class="danger" role="note"><${Icon} name="warn"/><span>${t(`danger.${worst[0]?.level ?? 'harm'}`)}
    ${worst.map((one) => html`<small>${one.text}</small>`)}</span></div>`;
}

/** @param {{plant: object, why: string, pair?: object[]}} props pair: the two zones this plant would part */
export function PlantCard({ plant, why, pair = [] }) {
  const care = plant.cautions?.filter((one) => one.who !== 'people' || one.level === 'care') ?? [];
  return html`<div class="why"><span class="label">${why}</span>${pair.length === 2 && html`<${Tab} zone=${pair[0]} size="small"/><span class="label or">${t('plants.or')}</span><${Tab} zone=${pair[1]} size="small"/>`}</div>
    <div class="title"><div><h2>${plant.common ?? plant.name}</h2>${plant.scientific && html`<p class="latin">${plant.scientific}</p>`}</div><${Form} form=${plant.form}/></div>
    ${plant.marks && html`<p class="marks">${plant.marks}</p>`}
    ${plant.lookalike_tell && html`<p class="hint"><${Icon} name="alike"/><span>${plant.lookalike_tell}</span></p>`}
    ${care.map((one) => html`<p class="hint care"><${Icon} name="warn"/><span>${t(`caution.${one.who}`, { text: one.text })}</span></p>`)}`;
}

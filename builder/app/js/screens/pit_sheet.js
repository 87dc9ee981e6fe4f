/** Soil pit: layers by hand, with their stones, and the water roots can draw on. */
import { html } from 'htm/preact';
import { FEEL_PATH, pitWaterMm } from '../core/soil_by_feel.js';
import { t } from './words.js';
import { change, site } from './state.js';
import { waterWords } from './say.js';
import { Frame } from './parts/frame.js';
import { Choice, Field } from './parts/choice.js';
import { readNumber } from './parts/read_number.js';

const CLASSES = Object.values(FEEL_PATH).flatMap((answers) => Object.values(answers)).filter((there) => there.startsWith('=')).map((there) => there.slice(1));
const FIGURES = [['thickness_cm', 1, 500, 'cm'], ['stones_vol_pct', 0, 99, '%'], ['organic_matter_pct', 0, 8, '%']];
const STARTED = { texture: null, thickness_cm: null, stones_vol_pct: null, organic_matter_pct: null };

export const textureWords = (texture) => t(`texture.${texture.replaceAll(' ', '_')}`);

/** Layers that say enough to be counted. @param {object[]} pit */
const whole = (pit) => pit.filter((layer) => layer.texture && layer.thickness_cm > 0);

export function PitSheet() {
  const record = site.value;
  const pit = record.production.pit ?? [];
  const put = (rows) => change({ production: { ...record.production, pit: rows } });
  const set = (i, patch) => put(pit.map((layer, at) => (at === i ? { ...layer, ...patch } : layer)));
  const counted = whole(pit);
  const held = counted.length > 0 ? pitWaterMm({ layers: counted }) : [];
  return html`<${Frame} tab="production" edge=${false} class="whole-width" title=${t('pit.title')} line=${record.name} back=${`#/site/${record.id}/production`}>
    <section class="part lead0 stack"><p>${t('pit.how')}</p><p class="deep"><a class="btn" href="#/book/soil">${t('feel.title')}</a></p></section>
    ${pit.map((layer, i) => html`<section class="part stack" key=${i}><h2 class="sides">${t('pit.layer', { n: i + 1 })}<button type="button" class="link" onClick=${() => put(pit.filter((_, at) => at !== i))}>${t('pit.drop')}</button></h2>
      <${Choice} label=${t('pit.texture')} options=${CLASSES.map((value) => ({ value, label: textureWords(value) }))} value=${layer.texture} onPick=${(texture) => set(i, { texture })}/>
      <div class="pair">${FIGURES.map(([name, low, high, unit]) => html`<${Field} key=${name} label=${t(`pit.${name}`)} mode="decimal" unit=${unit} value=${layer[name] ?? ''} limits=${[low, high]} onChange=${(text) => set(i, { [name]: readNumber(text, low, high) })}/>`)}</div>
      ${counted.includes(layer) && html`<p class="sum"><span>${t('pit.holds')}</span><b>${waterWords(held[counted.indexOf(layer)])}</b></p>`}</section>`)}
    <section class="part stack"><button type="button" class="btn wide" onClick=${() => put([...pit, STARTED])}>${t('pit.add')}</button>
      ${held.length > 0 && html`<p class="sum"><span>${t('pit.all')}</span><b>${waterWords(held.reduce((sum, mm) => sum + mm, 0))}</b></p>`}<p class="small quiet">${t('pit.limits')}</p></section></${Frame}>`;
}

/** Water the site's own pit holds; null where none was dug or it says too little. [mm] */
export function pitHeldMm(record) {
  const counted = whole(record.production.pit ?? []);
  return counted.length > 0 ? pitWaterMm({ layers: counted }).reduce((sum, mm) => sum + mm, 0) : null;
}

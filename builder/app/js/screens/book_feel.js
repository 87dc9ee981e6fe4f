/** Soil by feel: a handful, three questions, a texture, and the water it holds. */
import { html } from 'htm/preact';
import { useState } from 'preact/hooks';
import { FEEL_PATH, feelStep, feelWater } from '../core/soil_by_feel.js';
import { t } from './words.js';
import { Choice, Field } from './parts/choice.js';
import { readNumber } from './parts/wheel.js';

const MM_IN_10_CM = 100;

/** @returns the question path, one step at a time */
export function Feel() {
  const [answers, setAnswers] = useState({});
  const [organic, setOrganic] = useState(1);
  const [question, texture] = feelStep({ answers });
  const water = texture && feelWater({ texture, organic_matter_pct: organic });
  const asked = Object.keys(answers);
  return html`<section class="part lead0 stack">${[...asked, question].filter(Boolean).map((name) => html`<${Step} key=${name} name=${name} value=${answers[name] ?? null}
      onPick=${(value) => setAnswers({ ...Object.fromEntries(asked.slice(0, asked.includes(name) ? asked.indexOf(name) : asked.length).map((one) => [one, answers[one]])), [name]: value })}/>`)}
    ${texture && html`<p class="verdict">${t('feel.is', { texture: t(`texture.${texture.replaceAll(' ', '_')}`) })}</p><p>${t('feel.holds', { mm: Math.round((water.field_capacity - water.wilting_point) * MM_IN_10_CM) })}</p>
      <${Field} label=${t('feel.organic_field')} mode="decimal" unit="%" value=${organic} limits=${[0, 8]} onChange=${(text) => setOrganic(readNumber(text, 0, 8) ?? 1)}/>
      <p class="deep"><button type="button" class="btn" onClick=${() => setAnswers({})}>${t('feel.again')}</button></p>`}
    <p class="small quiet">${t('feel.after')}</p></section>`;
}

function Step({ name, value, onPick }) {
  const kind = name.startsWith('feel') ? 'grit' : name;
  const options = Object.keys(FEEL_PATH[name]).map((one) => ({ value: one, label: t(kind === 'grit' ? `feel.${one}` : `feel.${kind}_${one}`) }));
  return html`<${Choice} label=${t(`feel.${kind}`)} options=${options} value=${value} onPick=${onPick}/>`;
}

/** One ground question: what to look at, its answers as keys, why it is asked and what to do then. */
import { html } from 'htm/preact';
import { t } from './words.js';
import { change, region, say, site } from './state.js';
import { Choice } from './parts/choice.js';

/** @param {{question: object, value: string|undefined, unsure?: string}} props unsure: words of the no-evidence key */
export function Question({ question, value, unsure = t('question.cant_tell') }) {
  const options = [...question.answers, { value: 'cant_tell', label: unsure }];
  const pick = (picked) => answerQuestion(question, picked === value ? null : picked);
  const given = value && value !== 'cant_tell';
  const damage = value ? undefined : damageSays(question.id);
  return html`<div><${Choice} label=${question.ask} options=${options} value=${value ?? null} given=${damage} onPick=${pick} row/>
    ${damage && html`<p class="after small">${t('question.from_damage')}</p>`}
    ${given && question.act && html`<p class="after">${question.act}</p>`}</div>`;
}

/** What the damage named above answers beforehand; the person may answer otherwise. */
function damageSays(id) {
  return region.value.disturbances.find((one) => one.id === site.value.disturbance)?.states?.[id];
}

/** Keeps an answer to a ground question; null takes it out. */
export function answerQuestion(question, value) {
  const { [question.id]: _, ...rest } = site.value.questions;
  const label = question.answers.find((one) => one.value === value)?.label ?? t('question.cant_tell');
  const told = t('undo.question', { ask: question.ask, answer: value ? label : t('question.not_asked') });
  change({ questions: value ? { ...rest, [question.id]: value } : rest }, told);
  say(told);
}

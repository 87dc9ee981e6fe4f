/** Digging: first whether lines are cleared, or hand tool only; then the questions that need it. */
import { html } from 'htm/preact';
import { t } from './words.js';
import { change, region, site } from './state.js';
import { Choice, Field } from './parts/choice.js';
import { Icon } from './parts/icon.js';
import { Question } from './question.js';

/** @param {{questions: object[], record: object}} props */
export function Digging({ questions, record }) {
  return html`<div><${Safety} record=${record}/>
    ${questions.map((question) => (mayDig(question, record)
      ? html`<${Question} key=${question.id} question=${question} value=${record.questions[question.id]} unsure=${t('question.not_dug')}/>`
      : html`<div class="ask later" key=${question.id}><p>${question.ask}</p><p class="small">${t(record.digging.cleared === 'hand' ? 'dig.deeper' : 'dig.first', { depth: question.digs_cm })}</p></div>`))}</div>`;
}

/** True where this depth may be dug: lines cleared, or by hand no deeper than the tables allow. */
export function mayDig(question, record) {
  if (record.digging.cleared === 'lines') return true;
  return record.digging.cleared === 'hand' && question.digs_cm <= region.value.pack.settings.hand_tool_cm;
}

/** The safety answer that comes before any digging. @param {{record: object}} props */
export function Safety({ record }) {
  const { digging } = record;
  const set = (patch, told = null) => change({ digging: { ...digging, ...patch } }, told);
  return html`<div class="safety"><p class="care"><${Icon} name="warn"/><b>${t('dig.before')}</b></p>
    <${Choice} label=${t('dig.ask')} options=${['lines', 'hand', 'none'].map((value) => ({ value, label: t(`dig.${value}`, { depth: region.value.pack.settings.hand_tool_cm }) }))}
      value=${digging.cleared ?? 'none'} onPick=${(value) => set({ cleared: value === 'none' ? null : value, date: value === 'none' ? null : site.value.date }, t('undo.digging'))}/>
    ${digging.cleared === 'lines' && html`<div class="stack"><${Field} label=${t('dig.by')} value=${digging.by ?? ''} onChange=${(by) => set({ by })}/>
      <${Field} label=${t('dig.number')} value=${digging.number ?? ''} onChange=${(number) => set({ number })}/>
      <${Field} label=${t('dig.date')} type="date" value=${digging.date ?? ''} onChange=${(date) => set({ date })}/></div>`}
    <p class="small quiet">${t('dig.law')}</p></div>`;
}

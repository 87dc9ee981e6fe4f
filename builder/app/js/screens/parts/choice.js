/** Choosing one of a few: keys in a row when they are short, loose keys when they are many or long. */
import { html } from 'htm/preact';
import { useState } from 'preact/hooks';
import { number, sentence, t } from '../words.js';
import { isWrong } from './read_number.js';

/** @param {{label: string, options: {value: string, label: string}[], value: string|null, onPick: (value: string) => void, row?: boolean, hidden?: boolean, given?: string}} props
 *  given: the value that something else has answered beforehand
 *  hidden: the label is read out but a heading above already shows it */
export function Choice({ label, options, value, onPick, row = false, hidden = false, given }) {
  const long = options.length > 3 || options.some((one) => one.label.length > 12);
  const shape = row && !long ? 'seg' : 'chips';
  return html`<div class="ask" role="group" aria-label=${label}>
    ${!hidden && html`<p>${label}</p>`}
    <div class=${shape}>${options.map((one) => html`<button key=${one.value} type="button" class=${`${shape === 'chips' ? 'chip' : ''} ${one.value === given ? 'given' : ''}`}
      aria-pressed=${String(one.value === value)} onClick=${() => onPick(one.value)}>${sentence(one.label)}</button>`)}</div></div>`;
}

/** A value between a less and a more key. @param {{label: string, children: unknown, onLess: () => void, onMore: () => void, less: string, more: string}} props */
export function Stepper({ children, onLess, onMore, less, more }) {
  return html`<div class="slide"><button type="button" class="btn" aria-label=${less} onClick=${onLess}><span class="sign" aria-hidden="true">−</span></button>
    ${children}<button type="button" class="btn" aria-label=${more} onClick=${onMore}><span class="sign" aria-hidden="true">+</span></button></div>`;
}

/** One line to type in. Each key pressed is kept at once; what is being typed is never written over.
 *  @param {{label: string, value: string|number, onChange: (value: string) => void, type?: string, hint?: string, unit?: string, mode?: string, list?: string, late?: boolean, limits?: [number, number]}} props
 *  late: tell only when the line is left; limits: what is no number between them is named, never taken */
export function Field({ label, value, onChange, type = 'text', hint = '', unit = '', mode, list, late = false, limits }) {
  const [wrong, tellWrong] = useState(false);
  return html`<label class="field"><span>${label}</span>
    <span class="box"><${Typed} type=${type} mode=${mode} list=${list} value=${value} onChange=${onChange} late=${late} limits=${limits} onWrong=${tellWrong}/>${unit && html`<i>${unit}</i>`}</span>
    ${wrong ? html`<${Between} limits=${limits}/>` : hint && html`<small>${hint}</small>`}</label>`;
}

/** What may stand in the line, said where something else was typed. */
function Between({ limits }) {
  return html`<small class="care" role="alert">${t('refusal.between', { low: number(limits[0], limits[0] % 1 ? 2 : 0), high: number(limits[1]) })}</small>`;
}

/** The box itself, with its own draft while it has the focus, and for as long as it cannot be taken. */
export function Typed({ value, onChange, late = false, type = 'text', mode, label, list, placeholder, rows = 0, limits, onWrong }) {
  const [draft, setDraft] = useState(null);
  const wrong = draft !== null && isWrong(draft, limits);
  const typed = (event) => {
    setDraft(event.currentTarget.value);
    onWrong?.(isWrong(event.currentTarget.value, limits));
    if (!late) onChange(event.currentTarget.value);
  };
  const left = (event) => {
    if (late && draft !== null) onChange(event.currentTarget.value);
    if (!wrong) setDraft(null);
  };
  const shared = { value: draft ?? value, 'aria-invalid': wrong ? 'true' : undefined, onInput: typed, onBlur: left, 'aria-label': label, placeholder, inputmode: mode };
  return rows ? html`<textarea rows=${rows} ...${shared}></textarea>` : html`<input type=${type} list=${list} ...${shared}/>${wrong && !onWrong && html`<${Between} limits=${limits}/>`}`;
}

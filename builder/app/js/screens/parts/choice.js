/** Choosing one of a few: keys in a row when they are short, loose keys when they are many or long. */
import { html } from 'htm/preact';

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

const sentence = (text) => text.charAt(0).toLocaleUpperCase() + text.slice(1);

/** A value between a less and a more key. @param {{label: string, children: unknown, onLess: () => void, onMore: () => void, less: string, more: string}} props */
export function Stepper({ children, onLess, onMore, less, more }) {
  return html`<div class="slide"><button type="button" class="btn" aria-label=${less} onClick=${onLess}><span class="sign" aria-hidden="true">−</span></button>
    ${children}<button type="button" class="btn" aria-label=${more} onClick=${onMore}><span class="sign" aria-hidden="true">+</span></button></div>`;
}

/** One line to type in. @param {{label: string, value: string, onChange: (value: string) => void, type?: string, hint?: string, unit?: string}} props */
export function Field({ label, value, onChange, type = 'text', hint = '', unit = '', mode, list }) {
  return html`<label class="field"><span>${label}</span>
    <span class="box"><input type=${type} inputmode=${mode} list=${list} value=${value} onChange=${(event) => onChange(event.currentTarget.value)}/>${unit && html`<i>${unit}</i>`}</span>
    ${hint && html`<small>${hint}</small>`}</label>`;
}

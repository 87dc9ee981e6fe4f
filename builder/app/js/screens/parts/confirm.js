/** A key that asks once more before it does what cannot be undone. */
import { html } from 'htm/preact';
import { useState } from 'preact/hooks';
import { t } from '../words.js';

/** @param {{ask: string, sure: string, yes: string, onYes: () => void}} props */
export function Confirm({ ask, sure, yes, onYes }) {
  const [asked, setAsked] = useState(false);
  if (!asked) return html`<button type="button" class="btn plain left" onClick=${() => setAsked(true)}>${ask}</button>`;
  return html`<div class="confirm" role="group" aria-label=${sure}><p>${sure}</p>
    <div class="deep"><button type="button" class="btn stop" onClick=${onYes}>${yes}</button>
    <button type="button" class="btn" onClick=${() => setAsked(false)}>${t('confirm.no')}</button></div></div>`;
}

/** What went wrong while storing, in words, with what to do. Stays until the next save succeeds. */
import { html } from 'htm/preact';
import { has, t } from '../words.js';
import { trouble } from '../state.js';
import { Icon } from './icon.js';

/** @returns a strip over the foot, or nothing */
export function Trouble() {
  if (!trouble.value) return null;
  const key = has(`store.${trouble.value.code}`) ? `store.${trouble.value.code}` : 'store.aborted';
  return html`<div class="trouble" role="alert"><${Icon} name="warn"/><p>${t(key)}</p>
    <button type="button" class="btn plain" onClick=${() => { trouble.value = null; }}>${t('store.seen')}</button></div>`;
}

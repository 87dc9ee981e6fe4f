/** The page shown when the app cannot work here, with the reason and what to do. */
import { html } from 'htm/preact';
import { has, t } from './words.js';

/** @param {{fault: {code?: string}}} props */
export function Refusal({ fault }) {
  const key = fault.code === 'no_tables' ? 'app.no_tables' : has(`store.${fault.code}`) ? `store.${fault.code}` : 'app.broken';
  return html`<main class="refusal stack"><h1>${t('app.name')}</h1><p>${t(key)}</p>
    <button type="button" class="btn go" onClick=${() => location.reload()}>${t('app.reload')}</button></main>`;
}

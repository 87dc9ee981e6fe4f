/** Before anything is asked: up to three plants that cover most ground. */
import { html } from 'htm/preact';
import { t } from './words.js';
import { go, region, site } from './state.js';
import { findingWords } from './say.js';
import { nameOf } from './findings.js';
import { Later } from './parts/later.js';
import { UndoLine } from './parts/undo_line.js';

const Find = Later(() => import('./find.js'), 'Find');

/** @param {{root: string}} props */
export function AskNamed({ root }) {
  const here = region.value;
  const named = site.value.findings.filter((one) => one.named).sort((a, b) => a.named - b.named);
  const wanted = here.pack.settings.named_first;
  const head = html`<div class="named"><p class="label">${t('named.label')}</p><h2>${t('named.ask')}</h2>
      <ol class="lines">${Array.from({ length: wanted }, (_, i) => html`<li><b>${i + 1}</b>${named[i]
        ? html`<span class="got">${nameOf(here, named[i])} <span class="mine">${findingWords(here, named[i])}</span></span>`
        : html`<span>${t(`named.place_${Math.min(i + 1, 3)}`)}</span>`}</li>`)}</ol>
      <${UndoLine}/></div>`;
  return html`<${Find} root=${root} naming=${true} head=${head} onDone=${() => go(`${root}/next`, true)}/>`;
}

/** The head of every page: back, what and where, and the paper key (day, sun, night). */
import { html } from 'htm/preact';
import { t } from '../words.js';
import { mode, turnMode } from '../settings.js';
import { say } from '../state.js';
import { Icon } from './icon.js';

/** @param {{title: string, line?: string, back?: string}} props back: hash of the page one step up */
export function Bar({ title, line = '', back }) {
  return html`<header class="bar">
    ${back && html`<a class="square" href=${back} aria-label=${t('bar.back')}><${Icon} name="back"/></a>`}
    <div class="who"><h1 tabindex="-1">${title}</h1>${line && html`<p>${line}</p>`}</div>
    <${ModeKey}/></header>`;
}

/** One key turns the paper: day, sun, night. */
export function ModeKey() {
  const turn = () => {
    turnMode();
    say(t(`mode.${mode.value}`));
  };
  return html`<button class="square" type="button" onClick=${turn} aria-label=${t('bar.paper', { mode: t(`mode.${mode.value}`) })}><${Icon} name="sun"/></button>`;
}

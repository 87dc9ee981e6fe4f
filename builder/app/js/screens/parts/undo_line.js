/** The last thing done, and the key that takes it back. */
import { html } from 'htm/preact';
import { t } from '../words.js';
import { lastChange, say, undo } from '../state.js';
import { Icon } from './icon.js';

/** @returns a line just above the answers, or an empty place of the same height */
export function UndoLine() {
  const last = lastChange.value;
  const back = () => {
    undo();
    say(t('undo.done'));
  };
  return html`<div class="last">${last?.told && html`<span>${last.told}</span><button type="button" class="undo" onClick=${back}><${Icon} name="undo"/>${t('undo.key')}</button>`}</div>`;
}

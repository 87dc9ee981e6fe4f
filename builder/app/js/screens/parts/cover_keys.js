/** The answer keys: one tap is a whole entry. Hoops show each class of the region's scale true to share. */
import { html } from 'htm/preact';
import { useMemo } from 'preact/hooks';
import { t } from '../words.js';
import { coverWords } from '../say.js';
import { Hoop } from './hoop.js';

/** @param {{region: object, finding: object|undefined, none?: boolean, onAnswer: (answer: {state: string, cover: string|null}) => void}} props
 *  none: offer "searched, not there" as the first key */
export function CoverKeys({ region, finding, none = true, onAnswer }) {
  // The pictures stay the same from plant to plant; only what is pressed changes.
  const empty = useMemo(() => html`<${Hoop} mid_pct=${null}/>`, [region]);
  const keys = useMemo(() => region.cover.map((one) => ({ code: one.code, picture: html`<${Hoop} mid_pct=${one.mid_pct}/>`, words: coverWords(region, one.code, false), spoken: coverWords(region, one.code) })), [region]);
  const on = (code) => String(finding?.state === 'found' && finding.cover === code);
  return html`<div class="how" id="how"><b>${t('plants.how_much')}</b><span class="label">${t('unit.pct_sign')}</span></div>
    <div class=${`covers n${keys.length + (none ? 1 : 0)}`} role="group" aria-labelledby="how">
      ${none && html`<button type="button" class="cover" aria-pressed=${String(finding?.state === 'not_found')} onClick=${() => onAnswer({ state: 'not_found', cover: null })}>${empty}${t('finding.none')}</button>`}
      ${keys.map((one) => html`<button key=${one.code} type="button" class="cover" aria-pressed=${on(one.code)} aria-label=${one.spoken}
        onClick=${() => onAnswer({ state: 'found', cover: one.code })}>${one.picture}${one.words}</button>`)}</div>`;
}

/** Rain of this crop year as a share of normal, in steps of one key, with where it was learnt. */
import { html } from 'htm/preact';
import { t } from './words.js';
import { change } from './state.js';
import { Choice, Field, Stepper } from './parts/choice.js';
import { readNumber } from './parts/read_number.js';
import { warmerFrom, warmerShown, warmerUnit } from './say.js';

const LOW = 30;
const HIGH = 170;
const STEP = 5;
const WARMEST = 10;
const SOURCES = ['gauge', 'office', 'guess'];

/** Warmth of the year is asked for where the zone's growth follows it. @param {{record: object, own: object}} props */
export function Rain({ record, own }) {
  const { rain_share: share = null, rain_source: from = null, warmer_c: warmer = null } = record.production;
  const pct = share === null ? null : Math.round(share * 100);
  const put = (patch) => change({ production: { ...record.production, ...patch } }, t('undo.rain'));
  const step = (by) => {
    const next = pct === null ? 100 + by : Math.max(LOW, Math.min(HIGH, pct + by));
    put({ rain_share: next / 100, rain_source: from ?? 'guess' });
  };
  return html`<section class="part"><h2 class="sides">${t('rain.title')}<span class="mine">${pct === null ? t('rain.unknown') : t('rain.of_normal', { n: pct })}</span></h2>
    <${Stepper} less=${t('rain.less')} more=${t('rain.more')} onLess=${() => step(-STEP)} onMore=${() => step(STEP)}><${Line} pct=${pct}/></${Stepper}>
    ${own.warmth_response_per_c !== 0 && html`<${Field} label=${t('rain.warmer')} hint=${t('rain.warmer_why')} mode="text" unit=${warmerUnit()} value=${warmer === null ? '' : warmerShown(warmer)} limits=${[-WARMEST, WARMEST]} onChange=${(text) => put({ warmer_c: warmerFrom(readNumber(text, -WARMEST, WARMEST)), rain_source: from ?? 'guess' })}/>`}
    ${(pct !== null || warmer !== null) && html`<${Choice} label=${t('rain.from')} options=${SOURCES.map((value) => ({ value, label: t(`rain.${value}`) }))} value=${from} onPick=${(value) => put({ rain_source: value })} row/>
      <button type="button" class="btn plain left" onClick=${() => put({ rain_share: null, rain_source: null, warmer_c: null })}>${t('rain.forget')}</button>`}
    <p class="small quiet">${t('rain.why')}</p></section>`;
}

function Line({ pct }) {
  const at = (value) => 10 + ((value - LOW) / (HIGH - LOW)) * 180;
  return html`<svg viewBox="0 0 200 60" role="img" aria-label=${pct === null ? t('rain.unknown') : t('rain.of_normal', { n: pct })}>
    <path class="rule" d="M4 26h192"/>${[50, 75, 100, 125, 150].map((value) => html`<path class=${value === 100 ? 'mid' : 'tickmark'} d=${`M${at(value)} 18v16`}/><text x=${at(value)} y="54">${value}</text>`)}
    ${pct !== null && html`<path class="pull" d=${`M${at(pct)} 26H${at(100)}`}/><circle class="knob" cx=${at(pct)} cy="26" r="17"/><text class="onknob" x=${at(pct)} y="31">${pct}</text>`}</svg>`;
}

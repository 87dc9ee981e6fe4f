/** What was measured here: the clip sheet's mean, or a figure from elsewhere. */
import { html } from 'htm/preact';
import { t, number } from './words.js';
import { change, site } from './state.js';
import { yieldFrom, yieldShown, yieldSign } from './say.js';
import { Field } from './parts/choice.js';
import { readNumber } from './parts/wheel.js';
import { sheetOf } from './clip_figures.js';

/** @returns {{mean: number, take: number|null, plots: number}|null} kg/ha; the clip sheet leads, a typed figure follows */
export function measuredOf(record) {
  const sheet = sheetOf(record.production);
  if (sheet?.mean != null) return { mean: sheet.mean, take: sheet.take, plots: sheet.plots };
  const typed = record.production.measured_kg_ha ?? null;
  return typed === null ? null : { mean: typed, take: null, plots: 0 };
}

/** @param {{record: object}} props */
export function Measured({ record }) {
  const { production } = record;
  const sheet = sheetOf(production);
  const type = (text) => change({ production: { ...production, measured_kg_ha: yieldFrom(readNumber(text, 0, 100000)) } });
  return html`<section class="part stack"><h2 class="sides">${t('measured.title')}${sheet && html`<span class="label">${t('measured.plots', { n: sheet.plots })}</span>`}</h2>
    ${sheet?.more > 0 && html`<p class="small">${t('measured.more', { n: sheet.more, precision: Math.round(sheet.precision * 100) })}</p>`}
    <p class="deep"><a class="btn go" href=${`#/site/${site.value.id}/production/clip`}>${t(sheet ? 'measured.sheet_on' : 'measured.sheet')}</a></p>
    ${!sheet && html`<${Field} label=${t('measured.typed')} mode="decimal" unit=${yieldSign()} value=${production.measured_kg_ha == null ? '' : number(yieldShown(production.measured_kg_ha)).replace(/\D/g, '')} limits=${[0, 100000]} onChange=${type}/>`}</section>`;
}

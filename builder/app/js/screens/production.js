/** Production: what the ground should grow this year, what was measured, and where that falls. */
import { html } from 'htm/preact';
import { isProvisional, mixtureQuantile, placeOf, RANGE_SHARES, yearShare } from '../core/production.js';
import { t, number } from './words.js';
import { region, site } from './state.js';
import { yieldShown, yieldSign, yieldWords } from './say.js';
import { Frame } from './parts/frame.js';
import { RangeBar } from './parts/range_bar.js';
import { Source } from './parts/source.js';
import { CalledStrip, standing } from './standing_zone.js';
import { Rain } from './rain.js';
import { Measured, measuredOf } from './measured.js';
import { ClipSheet } from './clip.js';

/** @param {{parts: string[]}} props [] or ['clip'] */
export function Production({ parts }) {
  const stand = standing();
  const record = site.value;
  if (parts[0] === 'clip') return html`<${ClipSheet} stand=${stand}/>`;
  return html`<${Frame} tab="production" edge=${false} class="whole-width" line=${t('production.line')}>
    <${CalledStrip} stand=${stand}/>${stand && html`<${Expected} stand=${stand} record=${record}/>`}</${Frame}>`;
}

/** This year's range and the normal year's, from the zones by weight. [kg ha-1] */
export function expected(here, stand, rainShare) {
  const rows = [...stand.weights].filter(([id, weight]) => weight > 0 && here.pack.production[id]).map(([id, weight]) => ({ weight, ...here.pack.production[id] }));
  const range = (share) => RANGE_SHARES.map((part) => mixtureQuantile({
    share: part, weights: rows.map((row) => row.weight),
    centres_kg_ha: rows.map((row) => row.normal_kg_ha * yearShare({ rain_share: share, rain_response: row.rain_response })),
    spread_cvs: rows.map((row) => row.site_spread_cv),
  }));
  return { normal: range(1), year: rainShare === null ? null : range(rainShare) };
}

function Expected({ stand, record }) {
  const here = region.value;
  const own = here.pack.production[stand.zone.id];
  const { rain_share: rain = null, rain_source: from = null } = record.production;
  const { normal, year } = expected(here, stand, rain);
  const measured = measuredOf(record);
  const [low, high] = year ?? [own.low_kg_ha, own.high_kg_ha];
  const place = measured && year ? placeOf({ measured_kg_ha: measured.mean, low_kg_ha: low, high_kg_ha: high }) : null;
  const figures = { low: number(yieldShown(low)), high: number(yieldShown(high)), unit: yieldSign() };
  return html`<section class="part"><p class="verdict">${place ? t(`production.${place}`) : year ? t('production.this_year') : t('production.any_year')}</p>
      <p class="small">${year ? t('production.expected', figures) : t('production.years', { ...figures, normal: number(yieldShown(own.normal_kg_ha)) })}
        ${measured && html` ${t('production.you_have')} <b class="mine">${measured.take === null ? yieldWords(measured.mean) : t('production.give_or_take', { mean: number(yieldShown(measured.mean)), take: number(yieldShown(measured.take)) })}</b>.`}</p>
      ${place && isProvisional({ rain_source: from }) && html`<p class="small care">${t('production.provisional')}</p>`}
      <${RangeBar} zone=${stand.zone} range=${[low, high]} normal=${year ? normal : null} middle=${year ? null : own.normal_kg_ha} measured=${measured}/>
      <p class="small quiet">${t('production.counted', { counted: own.counted })} ${t('production.not_forage')}</p>
      <${Source} what=${t('production.these')} region=${here} keys=${[own.source]}/></section>
    <${Rain} record=${record}/><${Measured} record=${record} zone=${stand.zone}/>`;
}

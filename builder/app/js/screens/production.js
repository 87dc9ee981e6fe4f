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
import { Later } from './parts/later.js';
import { Rain } from './rain.js';
import { Measured, measuredOf } from './measured.js';
import { ClipSheet } from './clip.js';

const CoverSheet = Later(() => import('./cover_sheet.js'), 'CoverSheet');
const SiteYear = Later(() => import('./site_year.js'), 'SiteYear');
const PitSheet = Later(() => import('./pit_sheet.js'), 'PitSheet');
const Missed = Later(() => import('./missed.js'), 'Missed');

/** @param {{parts: string[]}} props [] · ['clip'] · ['cover'] · ['pit'] */
export function Production({ parts }) {
  const stand = standing();
  const record = site.value;
  if (parts[0] === 'clip') return html`<${ClipSheet} stand=${stand}/>`;
  if (parts[0] === 'pit') return html`<${PitSheet}/>`;
  if (parts[0] === 'cover' && stand) return html`<${CoverSheet} stand=${stand}/>`;
  return html`<${Frame} tab="production" edge=${false} class="whole-width" line=${t('production.line')}>
    <${CalledStrip} stand=${stand}/>${stand && html`<${Expected} stand=${stand} record=${record}/>`}</${Frame}>`;
}

/** This year's range and the normal year's, from the zones by weight. [kg ha-1]
 *  The year is known by its rain, or by its warmth alone where rain moves nothing. */
export function expected(here, stand, rainShare, warmer = null) {
  const rows = [...stand.weights].filter(([id, weight]) => weight > 0 && here.pack.production[id]).map(([id, weight]) => ({ weight, ...here.pack.production[id] }));
  const range = (share, warmth) => RANGE_SHARES.map((part) => mixtureQuantile({
    share: part, weights: rows.map((row) => row.weight),
    centres_kg_ha: rows.map((row) => row.normal_kg_ha * yearShare({ rain_share: share, rain_response: row.rain_response, warmer_c: warmth, warmth_response_per_c: row.warmth_response_per_c })),
    spread_cvs: rows.map((row) => row.site_spread_cv),
  }));
  const known = rainShare !== null || (warmer !== null && here.pack.production[stand.zone.id].rain_response === 0);
  return { normal: range(1, 0), year: known ? range(rainShare ?? 1, warmer ?? 0) : null };
}

/** True where a disturbance is marked, on Place or on Reclaim, that changes what grows. */
const isDisturbed = (here, record) => [record.disturbance, record.reclaim.disturbance].some((id) => here.disturbances.find((one) => one.id === id)?.disturbs);

function Expected({ stand, record }) {
  const here = region.value;
  const own = here.pack.production[stand.zone.id];
  const { rain_share: rain = null, rain_source: from = null, warmer_c: warmer = null } = record.production;
  const { normal, year } = expected(here, stand, rain, warmer);
  const measured = measuredOf(record);
  const [low, high] = year ?? [own.low_kg_ha, own.high_kg_ha];
  const place = measured && year ? placeOf({ measured_kg_ha: measured.mean, low_kg_ha: low, high_kg_ha: high }) : null;
  const figures = { low: number(yieldShown(low)), high: number(yieldShown(high)), unit: yieldSign() };
  return html`<section class="part"><p class="verdict">${place ? t(`production.${place}`) : year ? t('production.this_year') : t('production.any_year')}</p>
      <p class="small">${year ? t('production.expected', figures) : t('production.years', { ...figures, normal: number(yieldShown(own.normal_kg_ha)) })}
        ${measured && html` ${t('production.you_have')} <b class="mine">${measured.take === null ? yieldWords(measured.mean) : t('production.give_or_take', { mean: number(yieldShown(measured.mean)), take: number(yieldShown(measured.take)) })}</b>.`}</p>
      ${place && isProvisional({ rain_source: from }) && html`<p class="small care">${t('production.provisional')}</p>`}
      <${RangeBar} zone=${stand.zone} range=${[low, high]} normal=${year ? normal : null} middle=${year ? null : own.normal_kg_ha} measured=${measured}/>
      ${isDisturbed(here, record) && html`<p class="small care">${t('production.undisturbed', { zone: stand.zone.short })}</p>`}
      <p class="small quiet">${t('production.counted', { counted: own.counted })} ${t('production.not_forage')}</p>
      <${Source} what=${t('production.these')} region=${here} keys=${[own.source]}/></section>
    <${Rain} record=${record} own=${own}/><${Measured} record=${record} zone=${stand.zone}/>
    <section class="part"><p class="deep"><a class="btn" href=${`#/site/${record.id}/production/cover`}>${t('points.title')}</a> <a class="btn" href=${`#/site/${record.id}/production/pit`}>${t('pit.title')}</a></p></section>
    <${Missed} zone=${stand.zone} record=${record}/><${SiteYear} zone=${stand.zone} record=${record}/>`;
}

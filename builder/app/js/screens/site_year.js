/** The year at this site: rain, warmth and growing months at its own height, and what limits plants. */
import { html } from 'htm/preact';
import { limits } from '../core/year.js';
import { number, t } from './words.js';
import { region } from './state.js';
import { depthWords, waterWords, warmthWords } from './say.js';
import { YearDiagram } from './parts/year_diagram.js';
import { yearOf } from './pack_reading.js';
import { pitHeldMm } from './pit_sheet.js';

/** @param {{zone: object, record: object}} props */
export function SiteYear({ zone, record }) {
  const here = region.value;
  const { height_m } = record.place;
  const dug = pitHeldMm(record);
  const year = yearOf(here, zone, height_m, dug);
  if (!year) return null;
  const found = limits({ year, capacity_mm: year.capacity_mm, water_table_cm: here.pack.ground_water_cm?.[zone.id] ?? null, rule: here.pack.season_rule });
  const sums = { rain: waterWords(total(year.rain_mm)), lost: waterWords(total(year.potential_mm)), used: waterWords(total(year.actual_mm)), held: waterWords(year.capacity_mm) };
  return html`<section class="part stack"><h2>${t('here.title')}</h2><${YearDiagram} year=${year} letter=${zone.letter}/>
    <p>${found.length === 0 ? t('here.none') : found.map(({ key, values }) => said(key, values)).join(' ')}</p>
    <p class="small quiet">${t(height_m === null ? 'here.from_zone' : 'here.from_height', sums)} ${t(dug === null ? 'here.zone_soil' : 'here.own_soil')}</p></section>`;
}

const total = (months) => months.reduce((sum, month) => sum + month, 0);

function said(key, values) {
  if (key === 'wetness') return values.depth_cm <= 0 ? t('here.wet') : t('here.wetness', { depth: depthWords(values.depth_cm) });
  if (key === 'water') return t('here.water', { missing: waterWords(values.missing_mm), n: values.dry_months, warm: number(values.warm_months) });
  if (key === 'warmth') return t('here.warmth', { n: values.warm_months, warmest: warmthWords(values.warmest_c) });
  if (key === 'soil') return t('here.soil', { held: waterWords(values.held_mm) });
  return t('here.surplus', { surplus: waterWords(values.surplus_mm), rain: waterWords(values.rain_mm) });
}

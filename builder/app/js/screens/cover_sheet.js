/** Cover sheet: points by what lies under them, or classes plot by plot, with what doubt is left. */
import { html } from 'htm/preact';
import { frequency, meanCoverPct, pointShares } from '../core/cover.js';
import { number, t } from './words.js';
import { change, region, site } from './state.js';
import { Frame } from './parts/frame.js';
import { Typed } from './parts/choice.js';
import { readNumber } from './parts/read_number.js';

const CONFIDENCE = 0.9;
const MOST_POINTS = 100000;

/** @param {{stand: object}} props */
export function CoverSheet({ stand }) {
  const record = site.value;
  const put = (patch) => change({ production: { ...record.production, ...patch } });
  return html`<${Frame} tab="production" edge=${false} class="whole-width" title=${t('points.title')} line=${record.name} back=${`#/site/${record.id}/production`}>
    <${Points} own=${region.value.pack.production[stand.zone.id].ground_cover_pct} counts=${record.production.points ?? {}} onCounts=${(points) => put({ points })}/>
    <${Classes} text=${record.production.classes ?? ''} onText=${(classes) => put({ classes })}/></${Frame}>`;
}

function Points({ own, counts, onCounts }) {
  const names = Object.keys(own);
  const whole = Object.fromEntries(names.map((name) => [name, counts[name] ?? 0]));
  const all = names.reduce((sum, name) => sum + whole[name], 0);
  const shares = all > 0 ? pointShares({ counts: whole, confidence: CONFIDENCE }) : null;
  const take = (name, text) => onCounts({ ...counts, [name]: readNumber(text, 0, MOST_POINTS) === null ? null : Math.round(readNumber(text, 0, MOST_POINTS)) });
  return html`<section class="part lead0 stack"><p>${t('points.how')}</p>
    <table class="sheet-table"><thead><tr><th>${t('points.under')}</th><th>${t('points.count')}</th><th>${t('points.here')}</th><th>${t('points.zone')}</th></tr></thead>
      <tbody>${names.map((name) => html`<tr key=${name}><td>${t(`ground.${name}`)}</td><td><${Typed} mode="numeric" label=${t(`ground.${name}`)} value=${counts[name] ?? ''} placeholder="–" limits=${[0, MOST_POINTS]} onChange=${(text) => take(name, text)}/></td>
        <td class="got">${shares ? span(shares[name]) : '–'}</td><td>${number(own[name])}</td></tr>`)}</tbody></table>
    <p class="small quiet">${all > 0 ? t('points.so_far', { n: all }) : t('points.none')}</p></section>`;
}

const span = ([share, low, high]) => t('points.span', { share: number(share * 100), low: number(low * 100), high: number(high * 100) });

function Classes({ text, onText }) {
  const here = region.value;
  const codes = text.trim().split(/[\s;,]+/).filter(Boolean).map((code) => (code === '0' ? null : code));
  const known = here.cover.map(({ code }) => code);
  const strange = codes.filter((code) => code !== null && !known.includes(code));
  return html`<section class="part stack"><h2>${t('points.classes')}</h2><label class="field"><span>${t('points.codes', { codes: known.join(' ') })}</span><${Typed} rows=${2} value=${text} onChange=${onText}/></label>
    ${strange.length > 0 ? html`<p class="small care" role="alert">${t('points.strange', { code: strange[0] })}</p>`
      : codes.length > 0 && html`<p>${t('points.mean', { n: codes.length, mean: number(meanCoverPct({ codes, classes: here.cover }), 1), frequency: number(frequency({ codes }) * 100) })}</p>`}</section>`;
}

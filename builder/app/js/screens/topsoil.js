/** Topsoil ledger: depth by area for each lift, what to keep apart, how old and how high the piles are. */
import { html } from 'htm/preact';
import { ledger } from '../core/topsoil.js';
import { t, number } from './words.js';
import { change, region, site } from './state.js';
import { Frame } from './parts/frame.js';
import { Field } from './parts/choice.js';
import { readNumber } from './parts/wheel.js';
import { Icon } from './parts/icon.js';
import { notesOf } from './pack_reading.js';

const COLUMNS = [['area_ha', 0, 100000, 'ha'], ['depth_cm', 0, 500, 'cm'], ['stones_vol_pct', 0, 100, '%'], ['ec_ds_m', 0, 200, 'dS/m'], ['stored_months', 0, 600, ''], ['pile_height_m', 0, 50, 'm']];

/** @param {{stand: {zone: object}}} props */
export function Topsoil({ stand }) {
  const record = site.value;
  const kept = record.reclaim.topsoil ?? { lifts: [], swell_share: null, spread_ha: null };
  const put = (patch) => change({ reclaim: { ...record.reclaim, topsoil: { ...kept, ...patch } } });
  const set = (i, name, value) => put({ lifts: kept.lifts.map((lift, at) => (at === i ? { ...lift, [name]: value } : lift)) });
  const whole = kept.lifts.filter((lift) => lift.area_ha > 0 && lift.depth_cm > 0);
  const book = whole.length ? ledger({ lifts: whole, swell_share: kept.swell_share ?? 0, spread_ha: kept.spread_ha, limits: region.value.pack.topsoil_limits ?? {} }) : null;
  return html`<${Frame} tab="reclaim" edge=${false} class="whole-width" title=${t('topsoil.title')} line=${record.unit_name || record.name} back=${`#/site/${record.id}/reclaim`}>
    <section class="part lead0"><p>${notesOf(region.value, stand.zone.id)?.topsoil}</p></section>
    ${kept.lifts.map((lift, i) => html`<section class="part" key=${i}><h2 class="sides">${t('topsoil.lift', { n: i + 1 })}<button type="button" class="link" onClick=${() => put({ lifts: kept.lifts.filter((_, at) => at !== i) })}>${t('topsoil.drop')}</button></h2>
      <div class="pair">${COLUMNS.map(([name, low, high, unit]) => html`<${Field} key=${name} label=${t(`topsoil.${name}`)} mode="decimal" unit=${unit} value=${lift[name] ?? ''} limits=${[low, high]} onChange=${(text) => set(i, name, readNumber(text, low, high))}/>`)}</div>
      ${(book?.warnings ?? []).filter((one) => whole[one.lift] === lift).map((one) => html`<p class="hint care" key=${one.key}><${Icon} name="warn"/><span>${t(`topsoil.${one.key}`, one.values)}</span></p>`)}</section>`)}
    <section class="part stack"><button type="button" class="btn wide" onClick=${() => put({ lifts: [...kept.lifts, {}] })}><${Icon} name="plus"/>${t('topsoil.add')}</button>
      <div class="pair"><${Field} label=${t('topsoil.swell')} mode="decimal" unit="%" value=${kept.swell_share == null ? '' : Math.round(kept.swell_share * 100)} limits=${[0, 100]} onChange=${(text) => { const pct = readNumber(text, 0, 100); put({ swell_share: pct === null ? null : pct / 100 }); }}/>
        <${Field} label=${t('topsoil.spread')} mode="decimal" unit="ha" value=${kept.spread_ha ?? ''} limits=${[0, 100000]} onChange=${(text) => { const ha = readNumber(text, 0, 100000); put({ spread_ha: ha || null }); }}/></div></section>
    ${book && html`<section class="part stack"><h2>${t('topsoil.volumes')}</h2><p class="sum"><span>${t('topsoil.bank')}</span><b>${number(book.total_bank_m3)} m³</b></p>
      ${kept.swell_share != null && html`<p class="sum"><span>${t('topsoil.loose')}</span><b>${number(book.total_loose_m3)} m³</b></p>`}
      ${book.spread_depth_cm !== null && html`<p class="sum"><span>${t('topsoil.back')}</span><b>${number(book.spread_depth_cm, 1)} cm</b></p>`}</section>`}</${Frame}>`;
}

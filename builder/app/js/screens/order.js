/** Seed order: each line is a bag tag. A bag without a good tag is held, and says why. */
import { html } from 'htm/preact';
import { useState } from 'preact/hooks';
import { seedOrder } from '../core/seed_order.js';
import { t, number } from './words.js';
import { change, region, site } from './state.js';
import { areaWords, massWords } from './say.js';
import { Frame } from './parts/frame.js';
import { Choice, Stepper } from './parts/choice.js';
import { Icon } from './parts/icon.js';
import { mixOf, windowsOf } from './pack_reading.js';
import { remarkWords } from './order_words.js';
import { Tag } from './order_tag.js';

const AREA_STEP_HA = 0.5;

/** @param {{stand: {zone: object}}} props */
export function Order({ stand }) {
  const here = region.value;
  const record = site.value;
  const mix = mixOf(here, stand.zone.id);
  const kept = { area_ha: 1, method: mix?.method, sow_month: windowsOf(here, stand.zone.id).sow_months?.[0] ?? record.month, lots: {}, ...record.reclaim.order };
  const put = (patch) => change({ reclaim: { ...record.reclaim, order: { ...record.reclaim.order, ...patch } } });
  const back = `#/site/${record.id}/reclaim`;
  if (!mix || mix.plants.length === 0) return html`<${Frame} tab="reclaim" edge=${false} class="whole-width" title=${t('order.title')} line=${stand.zone.short} back=${back}><section class="part lead0"><p>${t('reclaim.no_seed')}</p></section></${Frame}>`;
  const methods = Object.entries(here.pack.seeding_methods ?? {}).filter(([, factor]) => typeof factor === 'number').map(([name]) => name);
  const lots = mix.plants.map(({ id, seeds_m2 }) => ({ id, seeds_m2, seeds_per_g: here.pack.seed_plants[id].seeds_per_g, ...kept.lots[id] }));
  const order = seedOrder({ lots, area_ha: kept.area_ha, base_method: mix.method, method: kept.method, factors: here.pack.seeding_methods ?? { [mix.method]: 1 }, sow_month: kept.sow_month, window_months: windowsOf(here, stand.zone.id).sow_months ?? [], today: record.date, stale_months: here.pack.tag_stale_months });
  const held = order.lines.filter(isHeld).length;
  const act = html`<div class="act upright"><p class="sum"><span>${t('order.so_far')} ${held > 0 && html`<b class="care small">${t('order.held', { n: held })}</b>`}</span><b>${massWords(order.lines.reduce((all, line) => all + (isHeld(line) ? 0 : line.bulk_kg ?? 0), 0))}</b></p>
      ${order.may_print ? html`<button type="button" class="btn go" onClick=${() => print()}><${Icon} name="print"/>${t('order.print')}</button>` : html`<p class="small">${t('order.mend', { n: held })}</p>`}</div>`;
  return html`<${Frame} tab="reclaim" act=${act} edge=${false} class="whole-width" title=${t('order.title')} line=${`${record.unit_name || record.name}. ${stand.zone.short}`} back=${back}>
    <section class="part lead0"><${Stepper} less=${t('order.less')} more=${t('order.more')} onLess=${() => put({ area_ha: Math.max(AREA_STEP_HA, kept.area_ha - AREA_STEP_HA) })} onMore=${() => put({ area_ha: kept.area_ha + AREA_STEP_HA })}>
      <p class="centre"><span class="label">${t('order.area')}</span><b class="mine big">${areaWords(kept.area_ha)}</b></p></${Stepper}>
      <${Choice} label=${t('order.method')} options=${(methods.length ? methods : [mix.method]).map((value) => ({ value, label: t(`method.${value}`) }))} value=${kept.method} onPick=${(method) => put({ method })} row/></section>
    <section class="part"><h2 class="sides">${t('order.bags')}<span class="label">${t('order.to_buy')}</span></h2>
      <ul>${lots.map((lot, i) => html`<${Bag} key=${lot.id} lot=${lot} line=${order.lines[i]} plant=${here.plant.get(lot.id)} onTag=${(tag) => put({ lots: { ...kept.lots, [lot.id]: tag } })}/>`)}</ul>
      ${order.remarks.map((one) => html`<p key=${one.key} class=${`hint ${one.level === 'refuse' ? 'care' : ''}`}><${Icon} name="warn"/><span>${remarkWords(one)}</span></p>`)}</section></${Frame}>`;
}

const isHeld = (line) => line.remarks.some((one) => one.level === 'refuse');

/** A bag without any tag yet says so once. */
function toldOf(lot, line) {
  const bare = lot.purity == null && !lot.test_date && !lot.lot;
  return bare ? line.remarks.filter((one) => one.key === 'tag_missing') : line.remarks;
}

function Bag({ lot, line, plant, onTag }) {
  const [open, setOpen] = useState(false);
  const held = isHeld(line);
  return html`<li class=${`bag ${held ? 'held' : ''}`}><div><h3>${plant.common}</h3><p>${t('order.seeds_m2', { n: lot.seeds_m2 })}${lot.lot ? html`<br/><span class="mine">${t('order.lot', { lot: lot.lot })}${line.pls_share === null ? '' : ` ${t('order.live', { pct: number(line.pls_share * 100) })}`}</span>` : ''}</p></div>
    <p class="kg">${line.bulk_kg === null ? '–' : massWords(line.bulk_kg)}<small>${line.pls_kg === null ? '' : t('order.pls', { mass: massWords(line.pls_kg) })}</small></p>
    ${toldOf(lot, line).map((one) => html`<p key=${one.key} class="hold"><${Icon} name="warn"/>${remarkWords(one)}</p>`)}
    ${open ? html`<${Tag} lot=${lot} plant=${plant} strict=${region.value.pack.seed_plants[lot.id].subspecies_matters} onKeep=${(tag) => { onTag(tag); setOpen(false); }} onShut=${() => setOpen(false)}/>` : html`<button type="button" class="link" onClick=${() => setOpen(true)}>${t(lot.lot ? 'order.tag_change' : 'order.tag_type')}</button>`}</li>`;
}

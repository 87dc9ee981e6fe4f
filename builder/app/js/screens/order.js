/** Seed order: each line is a bag tag. A bag without a good tag is held, and says why. */
import { html } from 'htm/preact';
import { useState } from 'preact/hooks';
import { seedOrder } from '../core/seed_order.js';
import { t, number } from './words.js';
import { change, region, say, site } from './state.js';
import { areaFrom, areaShown, areaSign, massWords } from './say.js';
import { Frame } from './parts/frame.js';
import { Choice, Field, Stepper } from './parts/choice.js';
import { readNumber } from './parts/read_number.js';
import { Icon } from './parts/icon.js';
import { Invented } from './parts/table_marks.js';
import { mixOf, windowsOf } from './pack_reading.js';
import { remarkWords } from './order_words.js';
import { Tag } from './order_tag.js';

// In the person's own unit: half a hectare, or half an acre.
const AREA_STEP = 0.5;
const AREA_LIMITS = [0.01, 100000];

/** An area that cannot be read is kept as null: then nothing is weighed out until it is mended.
 *  @param {{stand: {zone: object}}} props */
export function Order({ stand }) {
  const [tried, setTried] = useState(false);
  // A step writes over what could not be read: the box starts anew.
  const [steps, setSteps] = useState(0);
  const here = region.value;
  const record = site.value;
  const mix = mixOf(here, stand.zone.id);
  const kept = { area_ha: 1, method: mix?.method, sow_month: windowsOf(here, stand.zone.id).sow_months?.[0] ?? record.month, lots: {}, ...record.reclaim.order };
  const put = (patch) => change({ reclaim: { ...record.reclaim, order: { ...record.reclaim.order, ...patch } } });
  const back = `#/site/${record.id}/reclaim`;
  if (!mix || mix.plants.length === 0) return html`<${Frame} tab="reclaim" edge=${false} class="whole-width" title=${t('order.title')} line=${stand.zone.short} back=${back}><section class="part lead0"><p>${t('reclaim.no_seed')}</p></section></${Frame}>`;
  const methods = Object.entries(here.pack.seeding_methods ?? {}).filter(([, factor]) => typeof factor === 'number').map(([name]) => name);
  const lots = mix.plants.map(({ id, seeds_m2 }) => ({ id, seeds_m2, seeds_per_g: here.pack.seed_plants[id].seeds_per_g, ...kept.lots[id] }));
  const order = seedOrder({ lots, area_ha: kept.area_ha ?? 1, base_method: mix.method, method: kept.method, factors: here.pack.seeding_methods ?? { [mix.method]: 1 }, sow_month: kept.sow_month, window_months: windowsOf(here, stand.zone.id).sow_months ?? [], today: record.date, stale_months: here.pack.tag_stale_months });
  const sized = kept.area_ha !== null;
  const bags = lots.map((lot, i) => bagOf(lot, order.lines[i], sized, tried));
  const act = html`<${Act} bags=${bags} order=${order} sized=${sized} onTry=${() => setTried(true)}/>`;
  const step = (by) => {
    const next = (sized ? areaShown(kept.area_ha) : 0) + by;
    if (next < AREA_LIMITS[0] || next > AREA_LIMITS[1]) return;
    put({ area_ha: areaFrom(next) });
    setSteps(steps + 1);
  };
  return html`<${Frame} tab="reclaim" act=${act} edge=${false} class="whole-width" title=${t('order.title')} line=${`${record.unit_name || record.name}. ${stand.zone.short}`} back=${back}>
    <section class="part lead0"><${Invented}/><${Stepper} less=${t('order.less')} more=${t('order.more')} onLess=${() => step(-AREA_STEP)} onMore=${() => step(AREA_STEP)}>
      <${Field} key=${steps} label=${t('order.area')} mode="decimal" unit=${areaSign()} value=${sized ? areaShown(kept.area_ha) : ''} limits=${AREA_LIMITS} onChange=${(text) => put({ area_ha: areaFrom(readNumber(text, ...AREA_LIMITS)) })}/></${Stepper}>
      <${Choice} label=${t('order.method')} options=${(methods.length ? methods : [mix.method]).map((value) => ({ value, label: t(`method.${value}`) }))} value=${kept.method} onPick=${(method) => put({ method })} row/></section>
    <section class="part"><h2 class="sides">${t('order.bags')}<span class="label">${t('order.to_buy')}</span></h2>
      <ul>${bags.map((bag) => html`<${Bag} key=${bag.lot.id} bag=${bag} plant=${here.plant.get(bag.lot.id)} onTag=${(tag) => put({ lots: { ...kept.lots, [bag.lot.id]: tag } })}/>`)}</ul>
      ${order.remarks.map((one) => html`<p key=${one.key} class=${`hint ${one.level === 'refuse' ? 'care' : ''}`}><${Icon} name="warn"/><span>${remarkWords(one)}</span></p>`)}</section></${Frame}>`;
}

const refused = (remarks) => remarks.some((one) => one.level === 'refuse');

const FIGURES = ['id', 'seeds_m2', 'seeds_per_g'];
const isTyped = (value) => (Array.isArray(value) ? value.length > 0 : value != null && value !== '' && value !== false);

/** A bag as it is shown. It is called held only once something of its tag was typed, or the order was to be printed. */
function bagOf(lot, line, sized, tried) {
  const bare = !Object.entries(lot).some(([name, value]) => !FIGURES.includes(name) && isTyped(value));
  const shown = sized ? line : { ...line, bulk_kg: null, pls_kg: null };
  const held = refused(line.remarks) && (tried || !bare);
  const told = !bare ? line.remarks : tried ? line.remarks.filter((one) => one.key === 'tag_missing') : [];
  return { lot, line: shown, bare: bare && !tried, held, told };
}

/** What is bought so far, and the key that prints. A first try with tags untyped names every bag that is held. */
function Act({ bags, order, sized, onTry }) {
  const held = bags.filter((bag) => bag.held).length;
  const bare = bags.filter((bag) => bag.bare).length;
  const bought = bags.reduce((all, { line }) => all + (refused(line.remarks) ? 0 : line.bulk_kg ?? 0), 0);
  const press = () => {
    if (order.may_print) {
      print();
      return;
    }
    onTry();
    say(t('order.mend', { n: bags.filter(({ line }) => refused(line.remarks)).length }));
  };
  const key = html`<button type="button" class="btn go" onClick=${press}><${Icon} name="print"/>${t('order.print')}</button>`;
  const mend = html`${held > 0 && html`<p class="small">${t('order.mend', { n: held })}</p>`}${!sized && html`<p class="small">${t('order.no_area')}</p>`}`;
  return html`<div class="act upright"><p class="sum"><span>${t('order.so_far')} ${held > 0 && html`<b class="care small">${t('order.held', { n: held })}</b>`}${bare > 0 && html`<span class="small quiet">${t('order.untyped', { n: bare })}</span>`}</span><b>${massWords(bought)}</b></p>
      ${held > 0 || !sized || refused(order.remarks) ? mend : key}</div>`;
}

function Bag({ bag: { lot, line, bare, held, told }, plant, onTag }) {
  const [open, setOpen] = useState(false);
  return html`<li class=${`bag ${held ? 'held' : ''}`}><div><h3>${plant.common}</h3><p>${t('order.seeds_m2', { n: lot.seeds_m2 })}${lot.lot ? html`<br/><span class="mine">${t('order.lot', { lot: lot.lot })}${line.pls_share === null ? '' : ` ${t('order.live', { pct: number(line.pls_share * 100) })}`}</span>` : ''}</p></div>
    <p class="kg">${line.bulk_kg === null ? '–' : massWords(line.bulk_kg)}<small>${line.pls_kg === null ? '' : t('order.pls', { mass: massWords(line.pls_kg) })}</small></p>
    ${bare && html`<p class="untyped">${t('order.tag_untyped')}</p>`}${told.map((one) => html`<p key=${one.key} class="hold"><${Icon} name="warn"/>${remarkWords(one)}</p>`)}
    ${open ? html`<${Tag} lot=${lot} plant=${plant} strict=${region.value.pack.seed_plants[lot.id].subspecies_matters} onKeep=${(tag) => { onTag(tag); setOpen(false); }} onShut=${() => setOpen(false)}/>` : html`<button type="button" class="link" onClick=${() => setOpen(true)}>${t(lot.lot ? 'order.tag_change' : 'order.tag_type')}</button>`}</li>`;
}

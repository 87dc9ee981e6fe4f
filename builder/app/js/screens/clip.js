/** Clip sheet, ruled like a level book: a guess for every plot, some clipped, all in air-dry weight. */
import { html } from 'htm/preact';
import { t, number } from './words.js';
import { change, region, site } from './state.js';
import { yieldShown, yieldSign } from './say.js';
import { Frame } from './parts/frame.js';
import { Field, Typed } from './parts/choice.js';
import { readNumber } from './parts/wheel.js';
import { Icon } from './parts/icon.js';
import { harmsPeople } from './region.js';
import { aims, sheetOf } from './clip_figures.js';

/** @param {{stand: object|null}} props */
export function ClipSheet({ stand }) {
  const { production } = site.value;
  const own = stand && region.value.pack.production[stand.zone.id];
  const put = (patch) => change({ production: { plot_m2: own?.clip?.area_m2, ...production, ...patch } });
  const plots = production.plots ?? [];
  const sheet = sheetOf({ plot_m2: own?.clip?.area_m2, ...production });
  const set = (i, patch) => put({ plots: plots.map((row, at) => (at === i ? { ...row, ...patch } : row)) });
  const add = () => put({ plots: [...plots, { estimated_g: null, clipped_g: null }] });
  return html`<${Frame} tab="production" edge=${false} class="whole-width" title=${t('clip.title')} line=${site.value.name} back=${`#/site/${site.value.id}/production`}>
    <${Handling}/>
    <section class="part stack"><div class="pair"><${Field} label=${t('clip.area')} mode="decimal" unit="m²" value=${production.plot_m2 ?? own?.clip?.area_m2 ?? ''} limits=${[0.01, 1000]} onChange=${(text) => put({ plot_m2: readNumber(text, 0.01, 1000) })}/>
      <${Field} label=${t('clip.dry')} mode="decimal" unit="%" value=${Math.round((production.air_dry_share ?? 1) * 100)} limits=${PERCENT} onChange=${(text) => put({ air_dry_share: share(text) })}/>
      <${Field} label=${t('clip.ungrazed')} mode="decimal" unit="%" value=${Math.round((production.ungrazed_share ?? 1) * 100)} limits=${PERCENT} onChange=${(text) => put({ ungrazed_share: share(text) })}/>
      <${Field} label=${t('clip.done')} mode="decimal" unit="%" value=${Math.round((production.growth_done_share ?? 1) * 100)} limits=${PERCENT} onChange=${(text) => put({ growth_done_share: share(text) })}/></div>
      <p class="small quiet">${t('clip.how', { every: own?.clip?.every ?? 5 })}</p></section>
    <section class="part"><table class="sheet-table"><thead><tr><th>${t('clip.plot')}</th><th>${t('clip.guess')}</th><th>${t('clip.clipped')}</th><th>${yieldSign()}</th></tr></thead>
      <tbody>${plots.map((row, i) => html`<tr key=${i}><td>${i + 1}</td><td><${Grams} label=${t('clip.guess_n', { n: i + 1 })} value=${row.estimated_g} onChange=${(value) => set(i, { estimated_g: value })}/></td>
        <td class=${(i + 1) % (own?.clip?.every ?? 5) === 1 && row.clipped_g == null ? 'due' : ''}><${Grams} label=${t('clip.clipped_n', { n: i + 1 })} value=${row.clipped_g} onChange=${(value) => set(i, { clipped_g: value })}/></td><td class="got">${airDry(row, production, own)}</td></tr>`)}</tbody></table>
      <p class="deep"><button type="button" class="btn wide" onClick=${add}><${Icon} name="plus"/>${t('clip.add')}</button></p></section>
    <section class="part stack"><h2>${t('clip.so_far')}</h2><p>${sheetWords(sheet)}</p><p class="small quiet">${t('clip.aims', { precision: Math.round(aims(production).precision * 100), confidence: Math.round(aims(production).confidence * 100) })}</p></section></${Frame}>`;
}

const PERCENT = [1, 100];

const share = (text) => {
  const pct = readNumber(text, ...PERCENT);
  return pct === null ? 1 : pct / 100;
};

function Grams({ label, value, onChange }) {
  return html`<${Typed} mode="decimal" label=${label} value=${value ?? ''} placeholder="–" limits=${[0, 100000]} onChange=${(text) => onChange(readNumber(text, 0, 100000))}/>`;
}

function airDry(row, production, own) {
  const one = sheetOf({ plot_m2: own?.clip?.area_m2, ...production, plots: [row] });
  return one?.kg_ha[0] == null ? '–' : number(yieldShown(one.kg_ha[0]));
}

function sheetWords(sheet) {
  if (!sheet) return t('clip.nothing');
  if (sheet.mean === null) return t('clip.clip_more', { n: sheet.more });
  const mean = number(yieldShown(sheet.mean));
  const said = sheet.take === null ? t('clip.mean', { mean, unit: yieldSign() }) : t('clip.mean_take', { mean, take: number(yieldShown(sheet.take)), unit: yieldSign() });
  return sheet.more > 0 ? `${said} ${t('clip.more', { n: sheet.more })}` : said;
}

/** Before any clipping: what was found, plant or group, that can hurt a hand. */
function Handling() {
  const here = region.value;
  const found = site.value.findings.filter((one) => one.state === 'found').map((one) => here.plant.get(one.plant_id) ?? here.group.get(one.group_id)).filter((one) => one && harmsPeople(one));
  return html`<ul class="cautions"><li><${Icon} name="warn"/><span>${t('clip.gloves')}</span></li>
    ${found.map((plant) => html`<li key=${plant.id}><${Icon} name="warn"/><span><b>${plant.common ?? plant.name}.</b> ${plant.cautions.filter((one) => one.who === 'people').map((one) => one.text).join(' ')}</span></li>`)}</ul>`;
}

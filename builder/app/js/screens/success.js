/** Success test of a unit: plots against a standard or a reference area, by the region's own rule. */
import { html } from 'htm/preact';
import { ruleOf, successTest } from '../core/success_test.js';
import { t, number } from './words.js';
import { change, region, site, sites } from './state.js';
import { Frame } from './parts/frame.js';
import { Choice, Field, Typed } from './parts/choice.js';
import { readNumber } from './parts/wheel.js';
import { standardsOf, normalsOf } from './pack_reading.js';
import { Invented } from './parts/table_marks.js';
import { Trajectory } from './trajectory.js';

const MEASURES = { cover: '%', production: 'kg/ha', density: 'per m²' };

/** @param {{stand: {zone: object}}} props */
export function Success({ stand }) {
  const own = standardsOf(region.value, stand.zone.id);
  const lines = region.value.pack.success_rule.kind === 'trajectory' && own?.trajectory.length > 0;
  return lines ? html`<${Trajectory} zone=${stand.zone} success=${own}/>` : html`<${ByStandard} stand=${stand}/>`;
}

function ByStandard({ stand }) {
  const here = region.value;
  const record = site.value;
  const kept = { measure: 'cover', against: 'reference', values: [], reference: [], standard: null, years_since: null, ...record.reclaim.test };
  const put = (patch) => change({ reclaim: { ...record.reclaim, test: { ...kept, ...patch } } });
  const rain_mm = normalsOf(here, stand.zone)?.precip_mm.reduce((sum, mm) => sum + mm, 0) ?? null;
  const rule = ruleOf({ region: here.pack.success_rule, zone: standardsOf(here, stand.zone.id) ?? {}, rain_mm, measure: kept.measure, against: kept.against });
  const unit = MEASURES[kept.measure];
  return html`<${Frame} tab="reclaim" edge=${false} class="whole-width" title=${t('success.title')} line=${record.unit_name || record.name} back=${`#/site/${record.id}/reclaim`}>
    <section class="part lead0"><${Invented}/><${Choice} label=${t('success.measure')} options=${Object.keys(MEASURES).map((value) => ({ value, label: t(`success.${value}`) }))} value=${kept.measure} onPick=${(measure) => put({ measure })} row/>
      <${Choice} label=${t('success.against')} options=${['reference', 'standard'].map((value) => ({ value, label: t(`success.${value}`) }))} value=${kept.against} onPick=${(against) => put({ against })} row/>
      ${kept.against === 'reference' && html`<p class="small">${referenceWords(here, stand.zone, record)}</p>`}</section>
    <section class="part stack"><${Numbers} label=${t('success.values', { unit })} values=${kept.values} onValues=${(values) => put({ values })}/>
      ${kept.against === 'reference' ? html`<${Numbers} label=${t('success.reference_values', { unit })} values=${kept.reference} onValues=${(reference) => put({ reference })}/>`
        : html`<${Field} label=${t('success.standard_value')} mode="decimal" unit=${unit} value=${kept.standard ?? ''} limits=${[0, 1e6]} onChange=${(text) => put({ standard: readNumber(text, 0, 1e6) })}/>`}
      <${Field} label=${t('success.years_since')} mode="decimal" value=${kept.years_since ?? ''} limits=${[0, 200]} onChange=${(text) => put({ years_since: readNumber(text, 0, 200) })}/></section>
    <section class="part stack"><${Outcome} kept=${kept} rule=${rule}/></section>
    <section class="part small quiet stack"><p>${here.texts.region.success_rule}</p><p>${t('success.aims', { share: number((rule.share ?? 1) * 100), alpha: rule[`alpha_${rule.null_kind}`] })}</p><p>${t('reclaim.defer')}</p></section></${Frame}>`;
}

function Outcome({ kept, rule }) {
  const against = kept.against === 'reference' ? kept.reference.length >= 2 : kept.standard !== null;
  if (!against || kept.values.length === 0) return html`<p>${t('success.fill')}</p>`;
  if (rule.years !== null && kept.years_since === null) return html`<p>${t('success.say_years', { years: rule.years })}</p>`;
  const test = successTest({ values: kept.values, rule, standard: kept.against === 'standard' ? kept.standard : null, reference: kept.against === 'reference' ? kept.reference : null, years_since: kept.years_since });
  return html`<p class="verdict">${t(`success.is_${test.verdict}`)}</p><p>${t(test.sentence, { years: rule.years ?? 0, more: test.more, share: number(rule.share * 100) })}</p>
    ${test.deciding && html`<dl class="notes"><dt>${t('success.mean')}</dt><dd>${number(test.deciding.mean ?? mean(kept.values), 1)}</dd><dt>${t('success.plots')}</dt><dd>${t('success.plots_line', { n: kept.values.length, needed: test.plots_needed })}</dd>
      <dt>${t('success.other_null')}</dt><dd>${t(test.other.passes ? 'success.other_passes' : 'success.other_fails', { kind: t(`success.null_${test.null_kind === 'direct' ? 'reverse' : 'direct'}`) })}</dd></dl>`}`;
}

const mean = (values) => values.reduce((sum, value) => sum + value, 0) / values.length;

function referenceWords(here, zone, record) {
  const refs = sites.value.filter((row) => row.unit_id && row.unit_id === record.unit_id && row.role === 'reference' && row.call);
  if (refs.length === 0) return t('success.no_reference');
  const same = refs.every((row) => (row.overruled?.zone_id ?? row.call.zone_id) === zone.id);
  return t(same ? 'success.reference_same' : 'success.reference_other', { zone: zone.short });
}

function Numbers({ label, values, onValues }) {
  const read = (text) => onValues(text.split(/[\s;]+/).map((one) => readNumber(one, 0, 1e6)).filter((one) => one !== null));
  return html`<label class="field"><span>${label}</span><${Typed} rows=${2} mode="decimal" value=${values.join(' ')} onChange=${read}/><small>${t('success.how_typed', { n: values.length })}</small></label>`;
}

/** Success by trajectory: each of the zone's measures against its line for the years since the work. */
import { html } from 'htm/preact';
import { ruleOf, trajectoryCheck } from '../core/success_test.js';
import { number, t } from './words.js';
import { change, region, site } from './state.js';
import { Frame } from './parts/frame.js';
import { Field, Typed } from './parts/choice.js';
import { readNumber } from './parts/read_number.js';
import { Invented } from './parts/table_marks.js';

const MOST_YEARS = 200;

/** @param {{zone: object, success: object}} props success: the zone's standards with its trajectory */
export function Trajectory({ zone, success }) {
  const here = region.value;
  const record = site.value;
  const kept = { years_since: null, plots: {}, ...record.reclaim.test };
  const put = (patch) => change({ reclaim: { ...record.reclaim, test: { ...kept, ...patch } } });
  const rule = ruleOf({ region: here.pack.success_rule, zone: success, rain_mm: null });
  const course = kept.years_since === null ? null : trajectoryCheck({ lines: success.trajectory, plots: kept.plots, year: kept.years_since, rule: { ...rule, least: 2 } });
  return html`<${Frame} tab="reclaim" edge=${false} class="whole-width" title=${t('success.title')} line=${record.unit_name || record.name} back=${`#/site/${record.id}/reclaim`}>
    <section class="part lead0"><${Invented}/><${Field} label=${t('success.years_since')} mode="decimal" limits=${[0, MOST_YEARS]} value=${kept.years_since ?? ''} onChange=${(text) => put({ years_since: readNumber(text, 0, MOST_YEARS) })}/></section>
    ${success.trajectory.map((row, i) => html`<${Line} key=${`${zone.id} ${row.measure}`} row=${row} course=${course?.[i]} values=${kept.plots[row.measure] ?? []} onValues=${(values) => put({ plots: { ...kept.plots, [row.measure]: values } })}/>`)}
    <section class="part small quiet stack"><p>${here.texts.region.success_rule}</p><p>${t('reclaim.defer')}</p></section></${Frame}>`;
}

function Line({ row, course, values, onValues }) {
  const read = (text) => onValues(text.split(/[\s;]+/).map((one) => readNumber(one, -1e6, 1e6)).filter((one) => one !== null));
  return html`<section class="part stack"><h2>${t(`measure.${row.measure}`)}</h2>
    <label class="field"><span>${t('course.values')}</span><${Typed} rows=${2} mode="decimal" value=${values.join(' ')} onChange=${read}/><small>${t('success.how_typed', { n: values.length })}</small></label>
    ${course && html`<p>${said(course)}</p>`}</section>`;
}

function said({ verdict, line, at_most, test }) {
  if (verdict === 'not_asked') return t('course.not_asked');
  const asked = t(at_most ? 'course.at_most' : 'course.at_least', { line: number(line, line % 1 ? 1 : 0) });
  return test ? `${asked} ${t(`course.${verdict}`, { mean: number(test.mean, 1) })}` : `${asked} ${t('course.too_few')}`;
}

/** Findings of the open site check: look up, enter, take out. One finding for each plant or group. */
import { visible } from '../core/index.js';
import { change, say, site } from './state.js';
import { findingWords } from './say.js';
import { t } from './words.js';

const idOf = (finding) => finding.plant_id ?? finding.group_id;

/** The finding for a plant or group, or undefined. */
export function findingOf(record, id) {
  return record.findings.find((finding) => idOf(finding) === id);
}

/** True where a plant was looked for in vain in a month in which nobody could see it: the key leaves that out. */
export function isOffSeason(region, record, finding) {
  return finding.state === 'not_found' && Boolean(finding.plant_id) && visible(region.pack, record, finding.plant_id) === 'gone';
}

/** How many plants were named as covering most. */
export function namedCount(record) {
  return record.findings.filter((finding) => finding.named).length;
}

/** Enters one finding and says it. @param {object} region  @param {{id: string, common?: string, name?: string}} thing plant or group
 *  @param {{state: string, cover?: string|null, named?: number|null}} answer */
export function enter(region, thing, answer) {
  const key = region.plant.has(thing.id) ? 'plant_id' : 'group_id';
  const old = findingOf(site.value, thing.id);
  const finding = { [key]: thing.id, state: answer.state, cover: answer.cover ?? null, named: answer.named ?? keptName(old, answer) };
  const others = site.value.findings.filter((one) => idOf(one) !== thing.id);
  const told = t('undo.entry', { name: nameOf(region, finding), answer: findingWords(region, finding) });
  change({ findings: renamed([...others, finding]) }, told);
  say(isOffSeason(region, site.value, finding) ? `${told}. ${t('listed.off_season')}` : told);
}

const keptName = (old, answer) => (answer.state === 'found' ? old?.named ?? null : null);

/** Takes a finding out altogether. */
export function leaveOut(region, finding) {
  const rest = site.value.findings.filter((one) => idOf(one) !== idOf(finding));
  change({ findings: renamed(rest) }, t('undo.left_out', { name: nameOf(region, finding) }));
}

/** The named ones count 1, 2, 3 without a gap, in their order. */
function renamed(findings) {
  const order = findings.filter((one) => one.named).sort((a, b) => a.named - b.named);
  return findings.map((one) => (one.named ? { ...one, named: order.indexOf(one) + 1 } : one));
}

/** What a finding is about, in words. */
export function nameOf(region, finding) {
  if (finding.plant_id) return region.plant.get(finding.plant_id)?.common ?? finding.plant_id;
  return region.group.get(finding.group_id)?.name ?? finding.group_id;
}

/**
 * Habitat rules over plants, groups, ground answers and site facts, in three-valued logic.
 * Unknown stays unknown: a plant nobody searched for never fires or blocks a rule.
 */
import { toldAnswers } from './context.js';

const UNKNOWN = 0.5;
const truth = (value) => (value ? 1 : 0);

/** Rules that hold, as [{id, evidence, effect}], without those struck out. */
export function firedRules(key, site, findings) {
  const struck = new Set(site.struck ?? []);
  return key.pack.rules.filter(
    (rule) => !struck.has(rule.id) && holds(key, site, findings, rule.when) === 1,
  );
}

/** 1 true, 0 false, 0.5 unknown. */
export function holds(key, site, findings, when) {
  const inner = (one) => holds(key, site, findings, one);
  if (when.all) return Math.min(...when.all.map(inner));
  if (when.any) return Math.max(...when.any.map(inner));
  if (when.not) return 1 - inner(when.not);
  if (when.plant !== undefined) return coverHolds([key.plantAt.get(when.plant)], when, key, findings);
  if (when.group !== undefined) return groupHolds(key, findings, when);
  if (when.question !== undefined) return questionHolds(key, site, when);
  return factHolds(site, when);
}

function groupHolds(key, findings, when) {
  const members = key.pack.groups[key.groupAt.get(when.group)].members;
  if (when.count_at_least === undefined) return coverHolds(members, when, key, findings);
  let found = 0;
  let open = 0;
  members.forEach((p) => {
    const finding = findings.plants.get(p);
    if (finding?.state === 'found') found += 1;
    else if (finding?.state !== 'not_found') open += 1;
  });
  if (found >= when.count_at_least) return 1;
  return found + open < when.count_at_least ? 0 : UNKNOWN;
}

/** Summed cover of the members, between the lower and upper limits of their classes. */
function coverHolds(members, when, key, findings) {
  let least = 0;
  let most = 0;
  let found = false;
  members.forEach((p) => {
    const finding = findings.plants.get(p);
    if (finding?.state === 'not_found') return;
    if (finding?.state !== 'found') {
      most = Infinity;
      return;
    }
    found = true;
    const at = key.classAt.get(finding.cover);
    const range = at === undefined ? { low_pct: 0, high_pct: 100 } : key.pack.cover.classes[at];
    least += range.low_pct;
    most += range.high_pct;
  });
  const wanted = when.cover_at_least_pct ?? 0;
  if (wanted === 0) return found ? 1 : most === 0 ? 0 : UNKNOWN;
  if (least >= wanted) return 1;
  return most > wanted ? UNKNOWN : 0;
}

function questionHolds(key, site, when) {
  const value = toldAnswers(key, site).get(when.question);
  if (value === undefined) return UNKNOWN;
  return truth(Array.isArray(when.is) ? when.is.includes(value) : value === when.is);
}

function factHolds(site, when) {
  const value = site.place?.[when.fact] ?? site[when.fact];
  if (value === undefined || value === null) return UNKNOWN;
  if (when.is !== undefined) {
    return truth(Array.isArray(when.is) ? when.is.includes(value) : value === when.is);
  }
  if (when.at_least !== undefined && value < when.at_least) return 0;
  return truth(when.at_most === undefined || value <= when.at_most);
}

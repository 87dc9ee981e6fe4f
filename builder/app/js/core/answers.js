/** A site check's answers, each with its points per zone and its chance per zone. */
import { contextOf } from './context.js';
import { firedRules } from './rules.js';
import { roundHalfUp } from './rounding.js';
import { someOf } from './group.js';

/**
 * @typedef {object} Answer
 * @property {string} kind "plant" | "group" | "question" | "rule"
 * @property {string} id
 * @property {string} answer
 * @property {boolean} found
 * @property {number} at index of the plant, group or question
 * @property {number} step cover step 0..3, 4 not given, -1 not found
 * @property {number} v quarters, of "not found"
 * @property {boolean} plain its chance follows the tables, with no newcomer in it
 * @property {Int32Array} points whole centibans per zone
 */

/** @returns {{answers: Answer[], context: object, findings: object, rules: object[]}} */
export function readAnswers(key, site) {
  const findings = readFindings(key, site);
  const rules = firedRules(key, site, findings);
  const context = contextOf(key, site, rules.map((rule) => rule.effect).filter(Boolean));
  const answers = [
    ...[...findings.plants].map(([p, finding]) => plantAnswer(key, context, p, finding)),
    ...[...findings.groups].map(([g, finding]) => groupAnswer(key, context, findings, g, finding)),
    ...questionAnswers(key, site, context),
    ...rules.filter((rule) => rule.evidence).map((rule) => ({
      kind: 'rule', id: rule.id, answer: 'true', found: false, at: -1, step: -1, v: 4,
      plain: false, points: Int32Array.from(rule.evidence),
    })),
  ].filter(Boolean);
  answers.forEach((one) => {
    one.points = azonalShare(key, context, one.points);
    one.counts = spread(one.points) >= 1;
  });
  return { answers, context, findings, rules };
}

const spread = (points) => Math.max(...points) - Math.min(...points);

/** The last finding of a plant or group counts; "can't tell" is kept apart and says nothing. */
export function readFindings(key, site) {
  const plants = new Map();
  const groups = new Map();
  const open = new Set();
  const unsureGroups = new Set();
  (site.findings ?? []).forEach((finding) => {
    const at = finding.plant_id ? key.plantAt.get(finding.plant_id) : key.groupAt.get(finding.group_id);
    if (at === undefined) return;
    const into = finding.plant_id ? plants : groups;
    const unsure = finding.plant_id ? open : unsureGroups;
    into.delete(at);
    unsure.delete(at);
    if (finding.state === 'cant_tell') unsure.add(at);
    else into.set(at, finding);
  });
  groups.forEach((finding, g) => {
    if (finding.state !== 'not_found') unsureGroups.add(g);
  });
  unsureGroups.forEach((g) => key.pack.groups[g].members.forEach((p) => open.add(p)));
  const named = [...plants].filter(([, one]) => one.state === 'found' && one.named).map(([p]) => p);
  if (site.whole_plot_searched) {
    key.pack.plants.forEach((plant, p) => {
      if (!plants.has(p) && !open.has(p)) plants.set(p, { plant_id: plant.id, state: 'not_found' });
    });
  }
  return { plants, groups, open, named };
}

/** Cover step of a class code; 4 where none is given. */
export function stepOf(key, code) {
  const at = key.classAt.get(code);
  return at === undefined ? 4 : key.pack.cover.classes[at].step;
}

function plantAnswer(key, context, p, finding) {
  const found = finding.state === 'found';
  const step = found ? stepOf(key, finding.cover) : -1;
  const row = newcomerRow(key, context, p, found);
  return {
    kind: 'plant',
    id: key.pack.plants[p].id,
    answer: found ? (finding.cover ?? 'found') : 'not_found',
    found,
    at: p,
    step,
    v: context.v[p],
    plain: row < 0 && !context.sown[p],
    points: found ? foundPoints(key, context, p, step, row) : absentPoints(key, context, p, row),
  };
}

/** Row of the newcomer tables that stands for this answer, or -1. */
function newcomerRow(key, context, p, found) {
  if (context.newcomer < 0) return -1;
  const half = !found && context.seen[p] === 1 ? 1 : 0;
  return key.newcomer.at.get(`${p}/${context.newcomer}/${half}`) ?? -1;
}

function foundPoints(key, context, p, step, row) {
  const { Z } = key;
  if (context.sown[p]) return key.neutral;
  const weight = context.foundWeight[p];
  let points;
  if (row >= 0) points = key.newcomer.found[row][context.kept[p]];
  else {
    const any = key.found.subarray((p * 5 + 4) * Z, (p * 5 + 5) * Z);
    points = key.found.subarray((p * 5 + step) * Z, (p * 5 + step + 1) * Z);
    const cover = context.coverWeight[p];
    if (cover < 4) {
      points = Int32Array.from(points, (one, z) => any[z] + quarters(one - any[z], cover));
    }
  }
  return Int32Array.from(points, (one) => quarters(one, weight));
}

function absentPoints(key, context, p, row) {
  const v = context.v[p];
  if (context.sown[p] || context.seen[p] === 0) return key.neutral;
  if (row >= 0) return Int32Array.from(key.newcomer.absent[row][v]);
  if (v === 0) return key.neutral;
  const from = (p * 4 + v - 1) * key.Z;
  return Int32Array.from(key.absent.subarray(from, from + key.Z));
}

const quarters = (points, weight) => (weight === 4 ? points : roundHalfUp((points * weight) / 4));

function groupAnswer(key, context, findings, g, finding) {
  const group = key.pack.groups[g];
  if (group.use !== 'answer') return null;
  const found = finding.state === 'found';
  const free = group.members.filter((p) => !findings.plants.has(p));
  const silent = group.members.some(
    (p) => context.sown[p] || findings.plants.get(p)?.state === 'found',
  );
  let points = key.neutral;
  if (!found) {
    points = free.reduce((sum, p) => {
      const own = absentPoints(key, context, p, newcomerRow(key, context, p, false));
      return sum.map((one, z) => one + own[z]);
    }, new Int32Array(key.Z));
  } else if (!silent && free.length && context.newcomer < 0) points = someOf(key, g, free);
  return {
    kind: 'group', id: group.id, answer: finding.state, found, at: g, step: -1, v: 4,
    plain: found && free.length === group.members.length && context.newcomer < 0, points,
  };
}

function questionAnswers(key, site, context) {
  const given = site.questions ?? {};
  return key.pack.questions.map((question, at) => {
    const answer = question.answers.find((one) => one.value === given[question.id]);
    if (!answer?.evidence) return null;
    const weight = context.questionWeight.get(question.id) ?? 4;
    return {
      kind: 'question', id: question.id, answer: answer.value, found: false, at,
      step: question.answers.indexOf(answer), v: 4, plain: weight === 4,
      points: Int32Array.from(answer.evidence, (one) => quarters(one, weight)),
    };
  });
}

/** Water led in by people feeds azonal plants: what speaks for azonal ground counts in part. */
function azonalShare(key, context, points) {
  if (context.azonalWeight === 4) return points;
  return points.map((one, z) =>
    one > 0 && key.pack.zones[z].kind === 'azonal' ? quarters(one, context.azonalWeight) : one,
  );
}

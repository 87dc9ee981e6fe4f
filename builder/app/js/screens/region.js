/** A region as the screens read it: the pack's figures and one language's texts joined by id. */
import { colourOf, marksOf } from './parts/patterns.js';

/** @param {object} pack  @param {object} texts texts.<lang>.json
 *  @returns zones low to high with place, marks and colour; belts, lenses; plants, groups, questions by id */
export function makeRegion(pack, texts) {
  const belts = dressed(pack, texts, 'zonal');
  const lenses = dressed(pack, texts, 'azonal');
  const zones = [...belts, ...lenses];
  const plants = pack.plants.map((plant) => ({ ...texts.plants[plant.id], ...plant }));
  const groups = pack.groups.map((group) => withDanger({ ...texts.groups?.[group.id], ...group }, plants));
  const questions = pack.questions.filter((question) => question.asked !== false).map((question) => worded(question, texts.questions[question.id]));
  return {
    id: pack.region.id, pack, texts, belts, lenses, zones, plants, groups, questions,
    name: texts.region.name, edition: pack.region.edition,
    zone: byId(zones), plant: byId(plants), group: byId(groups), question: byId(questions),
    disturbances: pack.disturbances.map((one) => ({ ...one, name: texts.disturbances[one.id].name ?? texts.disturbances[one.id] })),
    cover: pack.cover.classes, coverOf: new Map(pack.cover.classes.map((one) => [one.code, one])),
  };
}

/** A group warns as its worst member does: who cannot tell which it is may hold that one. */
function withDanger(group, plants) {
  const said = group.members.map((at) => plants[at]).filter(harmsPeople).flatMap((plant) => plant.cautions ?? []).filter((one) => one.who === 'people' && one.level !== 'care');
  const worst = said.find((one) => one.level === 'deadly') ?? said[0];
  return worst ? { ...group, caution: true, cautions: [worst] } : group;
}

const byId = (rows) => new Map(rows.map((row) => [row.id, row]));

function dressed(pack, texts, kind) {
  const own = pack.zones.filter((zone) => zone.kind === kind);
  return own.map((zone, place) => {
    const whole = { ...texts.zones[zone.id], ...zone, index: pack.zones.indexOf(zone), place };
    return { ...whole, marks: marksOf(whole, place), colour: colourOf(whole, place, own.length) };
  });
}

function worded(question, text) {
  const answers = question.answers.map((answer) => ({ ...answer, label: text.answers[answer.value] }));
  return { ...text, ...question, answers };
}

/** True where the first thing said about a plant or group must be its caution: people, deadly or harm. */
export function harmsPeople(plant) {
  return Boolean(plant.caution);
}

/** The words of a cover class: "1–5 %"; the first "under 1 %", the last "over 95 %". */
export function coverBounds(region, code) {
  const index = region.cover.findIndex((one) => one.code === code);
  const { low_pct: low, high_pct: high } = region.cover[index];
  if (low === 0) return { key: 'under', low, high };
  if (high === 100) return { key: 'over', low, high };
  return { key: 'between', low, high };
}

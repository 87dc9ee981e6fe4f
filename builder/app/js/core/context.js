/** What month, disturbance and state answers do to the evidence of each plant. */
import { roundHalfUp } from './rounding.js';

/**
 * @typedef {object} Context
 * @property {Uint8Array} v quarters of a plant that could still be missed; 0 = absence says nothing
 * @property {Uint8Array} kept quarters of the old plants left, season apart
 * @property {Uint8Array} seen 2 now, 1 known when dry, 0 gone this month
 * @property {Uint8Array} sown 1 where the plant may come from a seed bag: it says nothing
 * @property {Uint8Array} foundWeight quarters of "found" that count
 * @property {Uint8Array} coverWeight quarters of cover that count
 * @property {number} newcomer level of newcomers, -1 for none
 * @property {number} azonalWeight quarters of what speaks for azonal ground
 * @property {Map<string, number>} questionWeight quarters of a ground answer that count
 */

/** more: effects of rules that hold, on top of the site's own. @returns {Context} */
export function contextOf(key, site, more = []) {
  const effects = activeEffects(key, site, more);
  const arrays = effects.map((effect) => effectArrays(key, effect));
  const context = blank(key, site, effects);
  const dry = key.settings.seen_dry_outside;
  key.pack.plants.forEach((plant, p) => {
    const seen = seenIn(plant, site.month);
    let kept = 1;
    arrays.forEach((one) => {
      kept = Math.min(kept, one.kept[p]);
      context.foundWeight[p] = Math.min(context.foundWeight[p], one.found[p]);
      context.coverWeight[p] = Math.min(context.coverWeight[p], one.cover[p]);
    });
    context.seen[p] = seen;
    context.kept[p] = roundHalfUp(4 * kept);
    context.v[p] = roundHalfUp(4 * kept * (seen === 2 ? 1 : seen === 1 ? dry : 0));
    context.sown[p] = context.seeded && (plant.mix || plant.weed === 'seeded') ? 1 : 0;
  });
  return context;
}

function blank(key, site, effects) {
  const has = (name) => effects.some((effect) => effect[name]);
  const quarters = effects.map((effect) => effect.azonal_weight ?? 4);
  return {
    v: new Uint8Array(key.P),
    kept: new Uint8Array(key.P),
    seen: new Uint8Array(key.P),
    sown: new Uint8Array(key.P),
    foundWeight: new Uint8Array(key.P).fill(4),
    coverWeight: new Uint8Array(key.P).fill(4),
    seeded: has('sown'),
    newcomer: effects.reduce((level, effect) => Math.max(level, effect.newcomer ?? -1), -1),
    azonalWeight: Math.min(4, ...quarters),
    questionWeight: questionWeights(effects),
    disturbed:
      Boolean(disturbanceOf(key, site)?.disturbs) ||
      effects.some((one) => one.newcomer !== undefined || one.sown || one.layers_gone),
    heightOff: has('height_off'),
    elevationShift: effects.reduce((sum, effect) => sum + (effect.elevation_shift_m ?? 0), 0),
    deadCounts: has('dead_counts'),
    secondCall: has('second_call'),
    movePlot: has('move_plot'),
  };
}

function questionWeights(effects) {
  const weights = new Map();
  effects.forEach((effect) =>
    Object.entries(effect.question_weight ?? {}).forEach(([id, weight]) =>
      weights.set(id, Math.min(weight, weights.get(id) ?? 4)),
    ),
  );
  return weights;
}

/** Is a plant recognisable in the month: 2 now, 1 known when dry, 0 gone. No month: 2. */
export function seenIn(plant, month) {
  if (!month || !plant.months) return 2;
  const [from, to] = plant.months;
  const inside = from <= to ? month >= from && month <= to : month >= from || month <= to;
  if (inside) return 2;
  return plant.known_when_dry ? 1 : 0;
}

export function disturbanceOf(key, site) {
  return key.pack.disturbances.find((one) => one.id === site.disturbance);
}

/** Ground answers by question: the site's own, else what its disturbance answers beforehand. */
export function toldAnswers(key, site) {
  const states = disturbanceOf(key, site)?.states ?? {};
  const given = site.questions ?? {};
  const told = new Map();
  key.pack.questions.forEach(({ id, answers }) => {
    const value = [given[id], states[id]].find((one) => answers.some((two) => two.value === one));
    if (value !== undefined) told.set(id, value);
  });
  return told;
}

/** Effects of the disturbance, of every answer told, and of rules that hold. */
function activeEffects(key, site, more) {
  const own = disturbanceOf(key, site)?.effect;
  const effects = own ? [own] : [];
  const told = toldAnswers(key, site);
  key.pack.questions.forEach((question) => {
    const answer = question.answers.find((one) => one.value === told.get(question.id));
    if (answer?.effect) effects.push(answer.effect);
  });
  return effects.concat(more);
}

function effectArrays(key, effect) {
  let arrays = key.effects.get(effect);
  if (!arrays) {
    const { plants, groups } = key.pack;
    const per = (shares, whole) =>
      plants.map((plant) => traitValue(plant, shares, groups) ?? whole);
    arrays = { kept: per(effect.kept, 1), found: per(effect.found, 4), cover: per(effect.cover, 4) };
    (effect.layers_gone ?? []).forEach((layer) =>
      plants.forEach((plant, p) => {
        if (plant.layer === layer) arrays.kept[p] = 0;
      }),
    );
    key.effects.set(effect, arrays);
  }
  return arrays;
}

/** Share of the plant's own groups, else the lowest of its other traits. */
function traitValue(plant, shares, groups) {
  if (!shares) return undefined;
  const grouped = plant.groups
    .map((g) => shares[`group:${groups[g].id}`])
    .filter((share) => share !== undefined);
  if (grouped.length) return Math.min(...grouped);
  const own = Object.entries(shares).filter(([trait]) => hasTrait(plant, trait));
  return own.length ? Math.min(...own.map(([, share]) => share)) : undefined;
}

function hasTrait(plant, trait) {
  return (
    trait === 'any' ||
    plant.fate === trait ||
    plant.response === trait ||
    plant.layer === trait ||
    plant.form === trait ||
    plant.form.startsWith(`${trait}_`) ||
    (trait === 'mix' && plant.mix)
  );
}

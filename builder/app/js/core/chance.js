/** How likely each answer is in each zone, for prompts and verdicts. */
import { NATS_PER_CENTIBAN } from './rounding.js';

/**
 * Chances of a plant's five answers (cover steps 0..3, not found) and their mean log, made once
 * per case. v: quarters of the plant that can be seen; bound: highest cover step still possible.
 */
export function plantChances(key, v, bound) {
  const name = `${v}/${bound}`;
  let made = key.chances.get(name);
  if (!made) {
    made = build(key, v, bound);
    key.chances.set(name, made);
  }
  return made;
}

function build(key, v, bound) {
  const { P, Z, presence, cover } = key;
  const chance = new Float64Array(P * 5 * Z);
  const certain = new Float64Array(P * Z);
  for (let p = 0; p < P; p += 1) {
    for (let z = 0; z < Z; z += 1) {
      const found = (presence[p * Z + z] * v) / 4;
      let possible = 1;
      for (let s = bound + 1; s < 4; s += 1) possible -= found * cover[(p * 4 + s) * Z + z];
      let sum = 0;
      for (let s = 0; s < 5; s += 1) {
        let share = 0;
        if (s === 4) share = 1 - found;
        else if (s <= bound) share = found * cover[(p * 4 + s) * Z + z];
        share /= possible;
        chance[(p * 5 + s) * Z + z] = share;
        if (share > 0) sum += share * Math.log(share);
      }
      certain[p * Z + z] = sum;
    }
  }
  return { chance, certain };
}

/** Chances of a ground question's answers: [answer][zone], adding to 1 in each zone. */
export function questionChances(key, at) {
  const name = `question/${at}`;
  let chance = key.chances.get(name);
  if (!chance) {
    const nats = NATS_PER_CENTIBAN / key.settings.temper;
    const { answers } = key.pack.questions[at];
    chance = answers.map((one) =>
      Float64Array.from(key.neutral, (zero, z) =>
        one.share * Math.exp((one.evidence?.[z] ?? 0) * nats)),
    );
    for (let z = 0; z < key.Z; z += 1) {
      const sum = chance.reduce((all, one) => all + one[z], 0);
      chance.forEach((one) => { one[z] /= sum; });
    }
    key.chances.set(name, chance);
  }
  return chance;
}

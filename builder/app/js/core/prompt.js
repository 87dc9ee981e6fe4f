/** What to look for or ask next: the answer expected to lower doubt most, less its price. */
import { weighSite, impliedOpen } from './belief.js';
import { plantChances, questionChances } from './chance.js';
import { prepare } from './prepare.js';
import { round6 } from './rounding.js';

/** Best prompts of a site check, best first; ties keep the order of the pack. */
export function prompts(pack, site, limit = 8) {
  const key = prepare(pack);
  return promptsOf(key, site, weighSite(key, site), limit);
}

/** The same from what was already weighed. */
export function promptsOf(key, site, weighed, limit) {
  const list = [...plantPrompts(key, weighed), ...questionPrompts(key, site, weighed)]
    .filter((one) => one.gain > key.settings.least_gain);
  list.sort((a, b) => b.gain - a.gain);
  return list.slice(0, limit);
}

function plantPrompts(key, weighed) {
  const { context, findings } = weighed;
  const list = [];
  key.pack.plants.forEach((plant, p) => {
    if (context.seen[p] < 2 || context.v[p] === 0 || context.sown[p]) return;
    if (findings.plants.has(p) || findings.open.has(p)) return;
    if (context.newcomer >= 0 && key.newcomer.at.has(`${p}/${context.newcomer}/0`)) return;
    const bound = weighed.bound >= 0 && impliedOpen(key, weighed, p) ? weighed.bound : 3;
    const gain = plantGain(key, weighed.belief, p, plantChances(key, context.v[p], bound));
    list.push({ kind: 'plant', id: plant.id, gain: round6(gain - plant.price_micronats / 1e6) });
  });
  return list;
}

/** Expected fall in entropy: zone and answer's mutual information. [nats] */
function plantGain(key, belief, p, { chance, certain }) {
  const { Z } = key;
  let gain = 0;
  for (let z = 0; z < Z; z += 1) gain += belief[z] * certain[p * Z + z];
  for (let s = 0; s < 5; s += 1) {
    const from = (p * 5 + s) * Z;
    let share = 0;
    for (let z = 0; z < Z; z += 1) share += belief[z] * chance[from + z];
    if (share > 0) gain -= share * Math.log(share);
  }
  return gain;
}

function questionPrompts(key, site, weighed) {
  const list = [];
  key.pack.questions.forEach((question, at) => {
    if (!question.answers.some((one) => one.evidence)) return;
    if (site.questions?.[question.id]) return;
    if (!mayDig(key, site, question)) return;
    let gain = 0;
    questionChances(key, at).forEach((chance) => {
      let share = 0;
      chance.forEach((one, z) => {
        share += weighed.belief[z] * one;
        gain += weighed.belief[z] * one * Math.log(one);
      });
      gain -= share * Math.log(share);
    });
    gain = round6(gain - question.price_micronats / 1e6);
    list.push({ kind: 'question', id: question.id, gain });
  });
  return list;
}

/** Digging only after buried lines were cleared, or by hand to the depth a hand tool may go. */
export function mayDig(key, site, question) {
  const depth = question.digs_cm ?? 0;
  if (depth === 0) return true;
  const cleared = site.digging?.cleared;
  return cleared === 'lines' || (cleared === 'hand' && depth <= key.settings.hand_tool_cm);
}

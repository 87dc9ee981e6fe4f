/** Zone, edge, mosaic, misfit or thin: scores of one look. */
import { plantChances, questionChances } from './chance.js';
import { fitOf } from './fit.js';
import { round6 } from './rounding.js';

/** Scores and verdict from what was weighed. */
export function judge(key, weighed) {
  const { settings } = key;
  const leader = weighed.order[0];
  const finds = weighed.answers
    .filter((one) => isFind(key, one))
    .reduce((sum, one) => sum + Math.max(...one.points), 0);
  const heard = weighed.answers.filter((one) => one.plain && one.counts);
  const pairs = explanations(key, weighed, heard);
  const scores = {
    zone: 0,
    edge: round6(settings.edge.times * pairs.edge.gain + settings.edge.plus),
    mosaic: round6(settings.mosaic.times * pairs.mosaic.gain + settings.mosaic.plus),
  };
  const fit = round6(fitOf(key, weighed, [leader]));
  const best = bestPair(scores, pairs);
  const other = best ? fitOf(key, weighed, best) : fit;
  scores.misfit = round6(settings.misfit.times * ((fit + other) / 2) + settings.misfit.plus);
  const share = zoneShare(scores);
  const thin = finds < settings.thin.finds_cb && weighed.belief[leader] < settings.thin.belief;
  const verdict = thin ? 'thin' : largest(scores);
  return {
    verdict,
    pair: verdict === 'edge' || verdict === 'mosaic' ? ids(key, pairs[verdict].pair) : null,
    scores,
    zone_share: share,
    look_again: !thin && share < settings.look_again_below,
    fit,
    finds_cb: finds,
  };
}

/** A plant or group found; weeds apart, which come anywhere. */
function isFind(key, answer) {
  const weed = answer.kind === 'plant' && key.pack.plants[answer.at].weed !== 'none';
  return answer.found && !weed;
}

const ids = (key, pair) => pair && pair.map((z) => key.pack.zones[z].id);

const largest = (scores) =>
  Object.keys(scores).reduce((best, name) => (scores[name] > scores[best] ? name : best));

const bestPair = (scores, pairs) => {
  const name = largest(scores);
  return name === 'zone' ? null : pairs[name].pair;
};

export function zoneShare(scores) {
  const all = Object.values(scores).reduce((sum, one) => sum + Math.exp(one), 0);
  return round6(Math.exp(scores.zone) / all);
}

/** Tempered gain in log likelihood of the best neighbours and the best other pair. [nats] */
function explanations(key, weighed, heard) {
  const result = { edge: { gain: 0, pair: null }, mosaic: { gain: 0, pair: null } };
  if (!heard.length) return result;
  const rows = heard.map((one) => answerRow(key, one));
  const together = rows.filter((row) => row.mixed);
  const apart = perZone(key, rows.filter((row) => row.apart), (row) => row.apart);
  const single = perZone(key, rows, (row) => row.single);
  const best = Math.max(...single);
  const scale = key.settings.temper / weighed.drag;
  Object.values(result).forEach((one) => { one.gain = -Infinity; });
  key.pairs.forEach(({ i, j, edge }) => {
    const sum = edge
      ? logOf(rows, (row) => 0.5 * (row.single[i] + row.single[j]))
      : apart[i] + apart[j] + logOf(together, (row) => row.mixed(i, j));
    const gain = round6(scale * (sum - best));
    const into = edge ? result.edge : result.mosaic;
    if (gain > into.gain) Object.assign(into, { gain, pair: byBelief(weighed, i, j) });
  });
  Object.values(result).forEach((one) => {
    if (one.pair === null) one.gain = key.settings.no_pair_gain;
  });
  return result;
}

/** Sum of logs of each zone's own chances. */
function perZone(key, rows, chances) {
  return Float64Array.from(key.neutral, (zero, z) => logOf(rows, (row) => chances(row)[z]));
}

const byBelief = (weighed, i, j) => (weighed.belief[j] > weighed.belief[i] ? [j, i] : [i, j]);

/** Sum of logs; products are taken first, logs every eighth answer, to keep the phone quick. */
function logOf(rows, chance) {
  let sum = 0;
  let product = 1;
  for (let at = 0; at < rows.length; at += 1) {
    product *= chance(rows[at]);
    if (at % 8 === 7) {
      sum += Math.log(product);
      product = 1;
    }
  }
  return sum + Math.log(product);
}

/**
 * Chances of one answer: single [zone], and where patches of two zones share the plot either
 * mixed(i, j), or apart [zone] whose product over both zones it is.
 */
export function answerRow(key, answer) {
  const { Z } = key;
  if (answer.kind === 'question') {
    const single = questionChances(key, answer.at)[answer.step];
    return { single, mixed: (i, j) => 0.5 * (single[i] + single[j]) };
  }
  const half = key.settings.mosaic_share;
  if (answer.kind === 'group') {
    const single = key.pack.evidence.groups[answer.at].expected.map((one) => one / 10000);
    return { single, mixed: (i, j) => 1 - (1 - half * single[i]) * (1 - half * single[j]) };
  }
  const p = answer.at;
  const presence = key.presence.subarray(p * Z, (p + 1) * Z);
  if (answer.step < 0) {
    const { chance } = plantChances(key, answer.v, 3);
    const single = chance.subarray((p * 5 + 4) * Z, (p * 5 + 5) * Z);
    const gone = half * (answer.v / 4);
    return { single, apart: presence.map((one) => 1 - gone * one) };
  }
  const both = (i, j) => 1 - (1 - half * presence[i]) * (1 - half * presence[j]);
  if (answer.step === 4) return { single: presence, mixed: both };
  const from = (p * 4 + answer.step) * Z;
  const share = key.cover.subarray(from, from + Z);
  const low = key.lowered.subarray(from, from + Z);
  const single = presence.map((one, z) => one * share[z]);
  const mixed = (i, j) =>
    (both(i, j) * (presence[i] * low[i] + presence[j] * low[j])) / (presence[i] + presence[j]);
  return { single, mixed };
}

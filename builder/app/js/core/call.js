/** One call from one look, and the verdict of three looks. */
import { weighSite } from './belief.js';
import { judge, zoneShare } from './verdict.js';
import { prepare } from './prepare.js';
import { promptsOf } from './prompt.js';
import { reasonsOf } from './reasons.js';
import { round6 } from './rounding.js';

/** The call of a site check. See index.js for its fields. */
export function call(pack, site, { prompts = 8 } = {}) {
  const key = prepare(pack);
  const weighed = weighSite(key, site);
  const [leader, rival = leader] = weighed.order;
  const asked = promptsOf(key, site, weighed, prompts);
  const { context } = weighed;
  return {
    ...summary(key, weighed),
    ...reasonsOf(key, weighed, leader, rival),
    prompts: asked,
    nothing_helps: asked.length === 0,
    rules_fired: weighed.rules.map((rule) => rule.id),
    notes: {
      height_off: context.heightOff,
      dead_counts: context.deadCounts,
      second_call: context.secondCall,
      move_plot: context.movePlot,
      disturbed: context.disturbed,
    },
  };
}

/** The verdict part alone. */
export function verdictOf(pack, site) {
  const key = prepare(pack);
  return summary(key, weighSite(key, site));
}

function summary(key, weighed) {
  const { zones } = key.pack;
  const [leader, rival = leader] = weighed.order;
  const named = weighed.findings.named.length;
  const left = weighed.context.disturbed ? 0 : key.settings.named_first - named;
  return {
    zone_id: zones[leader].id,
    next_zone_id: zones[rival].id,
    belief: Object.fromEntries(zones.map((zone, z) => [zone.id, weighed.belief[z]])),
    answers: weighed.n,
    named,
    name_more: Math.max(left, 0),
    sure: weighed.belief[leader] >= key.settings.sure,
    ...judge(key, weighed),
  };
}

/** Plot and two spots, each a site check, and what the person says of the stand. */
export function callThree(pack, site, spotA, spotB, stand = null) {
  const key = prepare(pack);
  const { settings, Z } = key;
  const looks = [site, spotA, spotB].map((one) => weighSite(key, one));
  const judged = looks.map((one) => judge(key, one));
  const [b0, bA, bB] = looks.map((one) => one.belief);
  let all = 0;
  const product = Float64Array.from(b0, (one, z) => one * bA[z] * bB[z]);
  product.forEach((one) => { all += one; });
  const zone = Math.log(Z * Z * all);
  const found = { edge: { sum: 0, count: 0, top: -1, pair: null }, mosaic: { sum: 0, count: 0, top: -1, pair: null } };
  key.pairs.forEach(({ i, j, edge }) => {
    const weight =
      ((Z ** 3 / 2) * (bA[i] * bB[j] + bA[j] * bB[i]) * (b0[i] + b0[j])) / 2;
    const into = edge ? found.edge : found.mosaic;
    into.sum += weight;
    into.count += 1;
    if (round6(weight) > into.top) Object.assign(into, { top: round6(weight), pair: [i, j] });
  });
  const three = settings.three;
  const fit = round6(judged.reduce((sum, one) => sum + one.fit, 0) / 3);
  const said = (name) => (stand ? Math.log(settings.stand[name][stand]) : 0);
  const pairScore = (name) => {
    const { sum, count } = found[name];
    const gain = count ? Math.log(sum / count) - zone : settings.no_pair_gain;
    return round6(three[name].times * gain + three[name].plus + said(name));
  };
  const scores = {
    zone: round6(said('zone')),
    edge: pairScore('edge'),
    mosaic: pairScore('mosaic'),
    misfit: round6(three.misfit.times * fit + three.misfit.plus + said('misfit')),
  };
  const finds = judged.reduce((sum, one) => sum + one.finds_cb, 0) / 3;
  const verdict = finds < three.thin_mean_finds_cb ? 'thin' : top(scores);
  const belief = product.map((one) => round6(one / all));
  const order = [...belief.keys()].sort((a, b) => belief[b] - belief[a] || a - b);
  const pair = verdict === 'edge' || verdict === 'mosaic' ? found[verdict].pair : null;
  const { zones } = key.pack;
  return {
    verdict,
    zone_id: zones[order[0]].id,
    next_zone_id: zones[order[1] ?? order[0]].id,
    pair: pair && pair.map((z) => zones[z].id),
    belief: Object.fromEntries(zones.map((one, z) => [one.id, belief[z]])),
    scores,
    zone_share: zoneShare(scores),
    fit,
  };
}

const top = (scores) =>
  Object.keys(scores).reduce((best, name) => (scores[name] > scores[best] ? name : best));

/** From answers to belief: sum, drag, prior, softmax, and a little doubt that never leaves. */
import { readAnswers, stepOf } from './answers.js';
import { heightPoints } from './height.js';
import { NATS_PER_CENTIBAN, round6, roundHalfUp } from './rounding.js';

/**
 * Everything a call is made of.
 * total[z] = area + height + (sum of points + implied) / drag, in centibans.
 */
export function weighSite(key, site) {
  const read = readAnswers(key, site);
  const { settings, Z } = key;
  const sum = new Int32Array(Z);
  let n = 0;
  read.answers.forEach((one) => {
    if (one.counts) n += 1;
    for (let z = 0; z < Z; z += 1) sum[z] += one.points[z];
  });
  const bound = impliedBound(key, site, read);
  const implied = impliedPoints(key, read, bound);
  const height = heightPoints(key, site, read.context);
  const drag = 1 + settings.drag * Math.min(Math.max(n - 1, 0), settings.drag_cap_answers);
  const area = settings.area_cb;
  const total = Float64Array.from(sum, (one, z) => area[z] + height[z] + (one + implied[z]) / drag);
  return { ...read, n, sum, bound, implied, height, drag, total, ...beliefOf(key, total) };
}

/** Belief per zone, rounded, and the zones in its order; ties keep the order of the pack. */
export function beliefOf(key, total) {
  const top = Math.max(...total);
  const weights = Float64Array.from(total, (one) => Math.exp((one - top) * NATS_PER_CENTIBAN));
  const all = weights.reduce((a, b) => a + b, 0);
  const doubt = key.settings.uniform_share;
  const belief = weights.map((one) => round6(((1 - doubt) * one) / all + doubt / key.Z));
  const order = [...belief.keys()].sort((a, b) => belief[b] - belief[a] || a - b);
  return { belief, order };
}

/** Lowest cover step named as most plentiful: what was not named covers no more. -1: none. */
function impliedBound(key, site, read) {
  if (read.context.disturbed || (site.struck ?? []).includes('implied')) return -1;
  const steps = read.findings.named
    .map((p) => stepOf(key, read.findings.plants.get(p).cover))
    .filter((step) => step < 4);
  const lowest = steps.length ? Math.min(...steps) : 4;
  return lowest < 3 ? lowest : -1;
}

/** Plants about which naming others says something: in season, not asked, not of a group found. */
export function impliedOpen(key, read, p) {
  return read.context.v[p] === 4 && !read.context.sown[p] && !read.findings.plants.has(p)
    && !read.grouped.has(p);
}

function impliedPoints(key, read, bound) {
  const { Z } = key;
  const points = new Int32Array(Z);
  read.grouped = new Set(
    [...read.findings.groups.keys()].flatMap((g) => key.pack.groups[g].members),
  );
  if (bound < 0) return points;
  for (let p = 0; p < key.P; p += 1) {
    if (!impliedOpen(key, read, p)) continue;
    const from = (p * 3 + bound) * Z;
    for (let z = 0; z < Z; z += 1) points[z] += key.implied[from + z];
  }
  return points.map((one) => roundHalfUp(one * key.settings.implied_weight));
}

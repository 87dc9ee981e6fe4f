/** Why this zone and not that one: whole centibans that add up exactly. */
import { weighSite } from './belief.js';
import { prepare } from './prepare.js';
import { roundHalfUp } from './rounding.js';

/** Points of every answer and line for zone A minus zone B. */
export function reasonsBetween(pack, site, zoneA, zoneB) {
  const key = prepare(pack);
  return reasonsOf(key, weighSite(key, site), key.zoneAt.get(zoneA), key.zoneAt.get(zoneB));
}

/** The same from what was already weighed; a and b are zone indexes. */
export function reasonsOf(key, weighed, a, b) {
  const reasons = weighed.answers.map((one) => ({
    kind: one.kind,
    id: one.id,
    answer: one.answer,
    points_cb: one.points[a] - one.points[b],
  }));
  const line = (kind, points) => reasons.push({ kind, id: null, answer: null, points_cb: points });
  line('implied', weighed.implied[a] - weighed.implied[b]);
  line('height', weighed.height[a] - weighed.height[b]);
  line('area', key.settings.area_cb[a] - key.settings.area_cb[b]);
  const whole = reasons.reduce((sum, one) => sum + one.points_cb, 0);
  const difference = roundHalfUp(weighed.total[a] - weighed.total[b]);
  line('drag', difference - whole);
  return { difference_cb: difference, reasons: reasons.filter((one) => one.points_cb !== 0) };
}

/** Small questions the screens put to a pack. */
import { readAnswers } from './answers.js';
import { seenIn } from './context.js';
import { bandsOf } from './height.js';
import { prepare } from './prepare.js';

/** Plants easily taken for this one, and the "some of these" groups it belongs to. */
export function lookAlikes(pack, plantId) {
  const key = prepare(pack);
  const plant = pack.plants[key.plantAt.get(plantId)];
  return {
    plants: plant.lookalikes.map((p) => pack.plants[p].id),
    groups: plant.groups.map((g) => pack.groups[g]).filter((g) => g.use === 'answer').map((g) => g.id),
  };
}

/** Can the plant be recognised in the site's month: "now", "dry" (as dead stems) or "gone". */
export function visible(pack, site, plantId) {
  const key = prepare(pack);
  return ['gone', 'dry', 'now'][seenIn(pack.plants[key.plantAt.get(plantId)], site.month)];
}

/** What one finding says by itself on this site, in whole centibans per zone. */
export function weighFinding(pack, site, finding) {
  const key = prepare(pack);
  const alone = { ...site, findings: [finding], questions: site.questions, whole_plot_searched: false };
  const answer = readAnswers(key, alone).answers.find((one) => one.kind === 'plant' || one.kind === 'group');
  const points = answer?.points ?? key.neutral;
  return { points_cb: Object.fromEntries(pack.zones.map((zone, z) => [zone.id, points[z]])) };
}

/** Bands of all zones as slope and aspect move them; null where a zone has none. [m] */
export function bandOf(pack, site) {
  return bandsOf(prepare(pack), site);
}

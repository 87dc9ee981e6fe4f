/** Plants that a zone leads one to expect, that were searched for here and not found. */
import { seenIn } from './context.js';
import { prepare } from './prepare.js';

/** A plant that one plot in five or more misses anyway says nothing by its absence. */
const MOST_CHANCE = 0.2;
const NOW = 2;

/**
 * Searched and not found, the least likely miss first: {plant_id, chance}. The chance is that a
 * plot of this zone, searched as well, records the plant not at all. Only plants that can be
 * known this month; nothing on disturbed ground, where absence has another cause.
 *
 * @param {object} pack @param {object} site @param {string} zoneId
 */
export function expectedMissed(pack, site, zoneId) {
  const key = prepare(pack);
  const damage = pack.disturbances.find(({ id }) => id === site.disturbance);
  const z = pack.zones.findIndex(({ id }) => id === zoneId);
  if (z < 0 || damage?.disturbs) return [];
  const state = new Map(site.findings.filter((one) => one.plant_id).map((one) => [one.plant_id, one.state]));
  const unlisted = site.whole_plot_searched ? 'not_found' : null;
  return pack.plants
    .map((plant, p) => ({ plant, plant_id: plant.id, chance: 1 - key.presence[p * key.Z + z] }))
    .filter(({ plant, chance }) => chance <= MOST_CHANCE && seenIn(plant, site.month) === NOW
      && (state.get(plant.id) ?? unlisted) === 'not_found')
    .sort((a, b) => a.chance - b.chance)
    .map(({ plant_id, chance }) => ({ plant_id, chance }));
}

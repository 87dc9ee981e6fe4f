/** Where the figures and notes of a zone lie in pack and texts: the one place that knows. */
import { carried, siteYear } from '../core/year.js';
import { profileWater } from '../core/soil_water.js';

/** The mix of a zone: {method, other_method, plants: [{id, seeds_m2}], live_plants, propagules}; null where none is sown. */
export function mixOf(here, zoneId) {
  const mix = here.pack.seed[zoneId];
  if (!mix) return null;
  const plants = Object.entries(mix.plants ?? {}).map(([id, seeds_m2]) => ({ id, seeds_m2 }));
  return { ...mix, ...here.texts.seed[zoneId], plants };
}

/** Notes in words: topsoil, seedbed, season, method, protection, cautions, fails, wildlife, soil_life, by_disturbance. */
export const notesOf = (here, zoneId) => here.texts.reclaim.zones[zoneId] ?? null;

/** Months for the work: {sow_months, plant_months, keep_off_months}. */
export const windowsOf = (here, zoneId) => here.pack.reclaim[zoneId]?.windows ?? { sow_months: [] };

/** The zone's own standards of success, if any. */
export const standardsOf = (here, zoneId) => here.pack.reclaim[zoneId]?.success ?? null;

/** Monthly normals of a zone: {tmax_c, tmin_c, precip_mm, elevation_m}; null where the tables have none. */
export const normalsOf = (here, zone) => here.pack.climate[zone.id] ?? null;

/** Layers, rooting depth and water table, with their words; null where the tables have none. */
export const soilOf = (here, zoneId) => (here.pack.soils[zoneId] ? { ...here.pack.soils[zoneId], ...here.texts.soils[zoneId] } : null);

/** Water each layer of a zone's soil holds down to its rooting depth. [{mm}] */
export function waterOf(here, soil) {
  return profileWater({ layers: soil.layers, depth_cm: soil.rooting_depth_cm, peat_classes: here.pack.peat_classes ?? [] });
}

/** Water and warmth of a zone month by month, at the site's own height and in its own soil where
 *  they are known. */
export function yearOf(here, zone, height_m = null, held_mm = null) {
  const normals = normalsOf(here, zone);
  const soil = soilOf(here, zone.id);
  if (!normals || !soil) return null;
  const { lapse, season_rule: rule } = here.pack;
  const [tmax_c, tmin_c, precip_mm] = height_m === null
    ? [normals.tmax_c, normals.tmin_c, normals.precip_mm]
    : carried({ ...normals, from_m: normals.elevation_m, to_m: height_m, ...lapse });
  const capacity_mm = held_mm ?? waterOf(here, soil).reduce((sum, layer) => sum + layer.mm, 0);
  return { ...siteYear({ latitude_deg: here.pack.region.latitude_deg, tmax_c, tmin_c, precip_mm, capacity_mm, water_table_cm: here.pack.ground_water_cm?.[zone.id] ?? null, rule }), capacity_mm };
}

/** What grows in a zone: plants with constancy and cover in percent, the most constant first. */
export function growsIn(here, zoneId) {
  const at = here.pack.zones.findIndex((zone) => zone.id === zoneId);
  return here.plants.map((plant, p) => ({ plant, ...occurrenceOf(here, p, at) }))
    .filter((row) => row.constancy_pct > 0).sort((a, b) => b.constancy_pct - a.constancy_pct);
}

/** Constancy and cover of plant p in zone z of the pack. [%] */
export function occurrenceOf(here, p, z) {
  const own = here.pack.occurrence[p].find(([zone]) => zone === z);
  return own ? { constancy_pct: own[1], cover_pct: own[2] } : { constancy_pct: 0, cover_pct: null };
}

/** Weeds whose range holds this zone or one beside it, by amplitude. @returns {{plant: object, here: boolean}[]} */
export function weedsFor(here, zone) {
  const near = new Set([zone.index, ...zone.neighbours]);
  return here.plants.map((plant, p) => ({ plant, p })).filter(({ plant }) => plant.weed && plant.weed !== 'none' && plant.weed !== 'seeded')
    .map(({ plant, p }) => ({ plant, here: occurrenceOf(here, p, zone.index).constancy_pct > 0, near: [...near].some((z) => occurrenceOf(here, p, z).constancy_pct > 0) }))
    .filter((row) => row.near).sort((a, b) => b.here - a.here);
}

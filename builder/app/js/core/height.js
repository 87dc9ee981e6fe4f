/** What height, slope and aspect say about the zones, in whole centibans. */
import { NATS_PER_CENTIBAN, roundHalfUp } from './rounding.js';

/** Points per zone; never more than the cap between two zones. @returns {Int32Array} */
export function heightPoints(key, site, context) {
  const points = new Int32Array(key.Z);
  const height = site.place?.height_m;
  if (height === null || height === undefined || context.heightOff) return points;
  const { cap_nats: cap, most_cb: most } = key.settings.height;
  const bands = bandsOf(key, site);
  const at = height + context.elevationShift;
  key.pack.zones.forEach((zone, z) => {
    if (!zone.band_m) return;
    const outside = Math.max(bands[z].low_m - at, at - bands[z].high_m, 0) / zone.soft_edge_m;
    points[z] = -roundHalfUp(Math.min(0.5 * outside * outside, cap) / NATS_PER_CENTIBAN);
  });
  const floor = Math.max(...points) - most;
  return points.map((one) => Math.max(one, floor));
}

/** Each zone's band, moved by the heat load of slope and aspect. [m] */
export function bandsOf(key, site) {
  const share = heatShare(key, site.place ?? {});
  return key.pack.zones.map((zone) => {
    if (!zone.band_m) return null;
    const shift = share >= 0 ? share * zone.south_shift_m : -share * zone.north_shift_m;
    return { low_m: zone.band_m[0] + shift, high_m: zone.band_m[1] + shift };
  });
}

/**
 * Heat load against level ground, as a share of that of the reference slope: 1 hot, -1 cool.
 * Equation 3 of McCune and Keon (2002); its figures come with the pack.
 */
export function heatShare(key, place) {
  const { slope_pct: slope, aspect_deg: aspect } = place;
  if (slope === null || slope === undefined || aspect === null || aspect === undefined) return 0;
  const heat = key.settings.heat_load;
  const degrees = Math.PI / 180;
  const tilt = Math.min(Math.atan(slope / 100), heat.steepest_deg * degrees);
  const latitude = Math.abs(heat.latitude_deg) * degrees;
  const turned = heat.latitude_deg < 0 ? aspect + 180 : aspect;
  const folded = Math.abs(180 - Math.abs((((turned % 360) + 360) % 360) - 225)) * degrees;
  const load =
    heat.constant +
    heat.cos_l_cos_s * Math.cos(latitude) * Math.cos(tilt) +
    heat.sin_l_sin_s * Math.sin(latitude) * Math.sin(tilt) +
    heat.cos_a_sin_s * Math.cos(folded) * Math.sin(tilt);
  const gain = load - heat.level;
  return gain >= 0 ? Math.min(gain / heat.hot, 1) : -Math.min(-gain / heat.cool, 1);
}

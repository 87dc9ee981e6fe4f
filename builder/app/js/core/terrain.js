/** Slope and aspect: conversions, folding, heat load (McCune & Keon 2002, equation 3). */
import { radians } from './climate.js';
import { needAboveZero, needNotNegative, needNumber, refuse } from './refusal.js';

/** Degrees of a slope in percent; 100 % is 45 degrees. @param {{slope_pct: number}} of */
export function slopeDeg({ slope_pct }) {
  return (Math.atan(needNotNegative('slope_pct', slope_pct) / 100) * 180) / Math.PI;
}

/** Percent of a slope in degrees. @param {{slope_deg: number}} of */
export function slopePct({ slope_deg }) {
  const slope = needNotNegative('slope_deg', slope_deg);
  if (slope >= 90) refuse('slope', { value: slope_deg });
  return Math.tan(radians(slope)) * 100;
}

/** A drawing's 3:1 is run 3, rise 1: 33 %. @param {{run: number, rise?: number}} of */
export function slopePctOfRatio({ run, rise = 1 }) {
  return (needNotNegative('rise', rise) / needAboveZero('run', run)) * 100;
}

/** Area along the slope of ground measured on the map. @param {{plan_ha: number, slope_pct: number}} of */
export function surfaceHa({ plan_ha, slope_pct }) {
  const steep = needNotNegative('slope_pct', slope_pct) / 100;
  return needNotNegative('plan_ha', plan_ha) * Math.hypot(1, steep);
}

function needAspect(aspect_deg) {
  const aspect = needNumber('aspect_deg', aspect_deg);
  if (aspect < 0 || aspect > 360) refuse('aspect', { value: aspect_deg });
  return aspect;
}

/** Aspect folded: NE 0, SW 180 (hottest). @param {{aspect_deg: number}} of */
export function heatFoldDeg({ aspect_deg }) {
  return Math.abs(180 - Math.abs(needAspect(aspect_deg) - 225));
}

/** Aspect folded: N 0, S 180 (most sun). @param {{aspect_deg: number}} of */
export function radiationFoldDeg({ aspect_deg }) {
  return 180 - Math.abs(needAspect(aspect_deg) - 180);
}

/**
 * Latitude and slope that can be true, aspect only where the ground is not flat.
 * @param {{latitude_deg: number, slope_deg: number, aspect_deg: number | null}} ground
 */
export function checkGround({ latitude_deg, slope_deg, aspect_deg }, lowest = 0) {
  const latitude = needNumber('latitude_deg', latitude_deg);
  if (latitude < -90 || latitude > 90) refuse('latitude', { value: latitude_deg });
  if (latitude < lowest || latitude > 60) {
    refuse('latitude_of_equation', { low: lowest, high: 60, value: latitude_deg });
  }
  const slope = needNumber('slope_deg', slope_deg);
  if (slope < 0 || slope > 90) refuse('slope', { value: slope_deg });
  if (slope === 0 && aspect_deg !== null) {
    needAspect(aspect_deg);
    refuse('aspect_on_flat');
  }
  if (slope > 0 && aspect_deg === null) refuse('aspect_missing', { value: slope_deg });
  return aspect_deg === null ? null : needAspect(aspect_deg);
}

/**
 * Potential yearly heat load, equation 3, not a logarithm. [MJ cm-2 yr-1]
 * Latitude 30 to 60 north, slope to 60 degrees; aspect null on flat ground, and only there.
 *
 * @param {{latitude_deg: number, slope_deg: number, aspect_deg: number | null}} ground
 */
export function heatLoad(ground) {
  const aspect = checkGround(ground, 30);
  if (ground.slope_deg > 60) refuse('slope_of_equation', { value: ground.slope_deg });
  const folded = aspect === null ? 0 : radians(heatFoldDeg({ aspect_deg: aspect }));
  const latitude = radians(ground.latitude_deg);
  const slope = radians(ground.slope_deg);
  return (
    0.339 +
    0.808 * Math.cos(latitude) * Math.cos(slope) -
    0.196 * Math.sin(latitude) * Math.sin(slope) -
    0.482 * Math.cos(folded) * Math.sin(slope)
  );
}

/**
 * Water that soil holds: mineral layers by Saxton & Rawls (2006), peat by squeeze class.
 * Sand and clay are percent here and fractions inside; organic matter stays in PERCENT.
 */
import { needNotNegative, needNumber, needPercent, needShare, refuse } from './refusal.js';
import { checkedSoil } from './texture.js';

const MOST_ORGANIC_PCT = 8;
const MOST_CLAY_PCT = 60;
const PARTICLE_DENSITY = 2.65;
/** Saturation less field capacity, held at this or more by the paper. */
const LEAST_DRAINED = 0.005;

const bent = (first, square, line, constant) => first + square * first * first + line * first + constant;

/**
 * Water held by a mineral soil without stones, by volume.
 * @param {{sand_pct: number, clay_pct: number, organic_matter_pct: number, density_factor?: number}} of
 */
export function mineralWater({ sand_pct, clay_pct, organic_matter_pct, density_factor = 1 }) {
  const s = needPercent('sand_pct', sand_pct) / 100;
  const c = needPercent('clay_pct', clay_pct) / 100;
  const om = needPercent('organic_matter_pct', organic_matter_pct);
  const factor = needNumber('density_factor', density_factor);
  if (s + c > 1 + 1e-9) {
    refuse('more_than_all', { field: 'sand_pct + clay_pct', value: (s + c) * 100, limit: 100 });
  }
  if (om > MOST_ORGANIC_PCT) refuse('organic_matter_too_high', { limit: MOST_ORGANIC_PCT, value: om });
  if (clay_pct > MOST_CLAY_PCT) refuse('clay_too_high', { limit: MOST_CLAY_PCT, value: clay_pct });
  if (factor < 0.9 || factor > 1.3) refuse('density_factor', { value: density_factor });
  let t = -0.024 * s + 0.487 * c + 0.006 * om + 0.005 * s * om - 0.013 * c * om + 0.068 * s * c;
  const wilting_point = bent(t + 0.031, 0, 0.14, -0.02);
  t = -0.251 * s + 0.195 * c + 0.011 * om + 0.006 * s * om - 0.027 * c * om + 0.452 * s * c;
  let field_capacity = bent(t + 0.299, 1.283, -0.374, -0.015);
  t = 0.278 * s + 0.034 * c + 0.022 * om - 0.018 * s * om - 0.027 * c * om - 0.584 * s * c;
  const full = field_capacity + bent(t + 0.078, 0, 0.636, -0.107) - 0.097 * s + 0.043;
  const bulk_density = (1 - full) * PARTICLE_DENSITY * factor;
  const saturation = 1 - bulk_density / PARTICLE_DENSITY;
  field_capacity -= 0.2 * (full - saturation);
  if (field_capacity >= saturation) refuse('packed_too_far', { value: density_factor });
  const slope = (Math.log(field_capacity) - Math.log(wilting_point)) / (Math.log(1500) - Math.log(33));
  const flow_mm_h = 1930 * Math.max(LEAST_DRAINED, saturation - field_capacity) ** (3 - slope);
  return { wilting_point, field_capacity, saturation, bulk_density, flow_mm_h };
}

/** Volume share of gravel given by weight. @param {{matric_density: number, gravel_weight_share: number}} of */
export function gravelVolumeShare({ matric_density, gravel_weight_share }) {
  const light = needNotNegative('matric_density', matric_density) / PARTICLE_DENSITY;
  const weight = needShare('gravel_weight_share', gravel_weight_share);
  return (light * weight) / (1 - weight * (1 - light));
}

/** Water plants can take from a layer. [mm] @param {{thickness_cm: number, available: number, stones_share?: number}} of */
export function layerWaterMm({ thickness_cm, available, stones_share = 0 }) {
  const depth = needNotNegative('thickness_cm', thickness_cm);
  return 10 * depth * needShare('available', available) * (1 - needShare('stones_share', stones_share));
}

/** [field capacity, wilting point] of peat by squeeze class. @param {{von_post_h: number, classes: object[]}} of */
export function peatWater({ von_post_h, classes }) {
  const squeeze = needNumber('von_post_h', von_post_h);
  const row = classes.find(({ von_post }) => von_post[0] <= squeeze && squeeze <= von_post[1]);
  return row ? [row.field_capacity, row.wilting_point] : refuse('peat_class_missing', { value: von_post_h });
}

const KINDS = ['mineral', 'peat', 'organic_mineral'];
const stated = ({ field_capacity, wilting_point }) => (field_capacity ?? null) !== null && (wilting_point ?? null) !== null;

/** Available water of a layer by its kind, by volume. @param {{layer: object, peat_classes?: object[]}} of */
export function layerAvailable({ layer, peat_classes = [] }) {
  const kind = layer.kind ?? 'mineral';
  if (!KINDS.includes(kind)) refuse('unknown_choice', { field: 'kind', value: kind });
  let { field_capacity, wilting_point } = layer;
  if (!stated(layer)) {
    if (kind === 'organic_mineral') refuse('layer_water_missing');
    if (kind === 'mineral') {
      checkedSoil(layer);
      const organic = Math.min(MOST_ORGANIC_PCT, needPercent('organic_matter_pct', layer.organic_matter_pct));
      const water = mineralWater({ ...layer, organic_matter_pct: organic, density_factor: 1 });
      return water.field_capacity - water.wilting_point;
    }
    [field_capacity, wilting_point] = peatWater({ von_post_h: layer.von_post_h, classes: peat_classes });
  }
  const capacity = needShare('field_capacity', field_capacity);
  if (needShare('wilting_point', wilting_point) > capacity) {
    refuse('wilting_over_capacity', { wilting_point, field_capacity });
  }
  return capacity - wilting_point;
}

/**
 * Water plants can take from each layer down to a depth: {mm, at_limit}. at_limit says that
 * organic matter lay over what the equation knows and was counted as 8 %.
 *
 * @param {{layers: object[], depth_cm: number, peat_classes?: object[]}} of
 */
export function profileWater({ layers, depth_cm, peat_classes = [] }) {
  if (!layers.length) refuse('layers_missing');
  const depth = needNotNegative('depth_cm', depth_cm);
  let reached = 0;
  return layers.map((layer) => {
    const top = needNotNegative('top_cm', layer.top_cm);
    const bottom = needNotNegative('bottom_cm', layer.bottom_cm);
    if (bottom <= top) refuse('layer_order', { top_cm: top, bottom_cm: bottom });
    if (top !== reached) refuse('layer_gap', { value: top });
    reached = bottom;
    const kind = layer.kind ?? 'mineral';
    const stones = needPercent('stones_vol_pct', layer.stones_vol_pct ?? 0) / 100;
    const mm = layerWaterMm({
      thickness_cm: Math.max(0, Math.min(bottom, depth) - top),
      available: layerAvailable({ layer, peat_classes }),
      stones_share: kind === 'peat' ? 0 : stones,
    });
    const rich = (layer.organic_matter_pct ?? 0) > MOST_ORGANIC_PCT;
    return { mm, at_limit: kind === 'mineral' && !stated(layer) && rich };
  });
}

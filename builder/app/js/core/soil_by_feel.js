/** Texture by hand: a short path of questions after Thien (1979), to a class and its water. */
import { needPercent, refuse } from './refusal.js';
import { layerWaterMm, mineralWater } from './soil_water.js';
import { classCentre } from './texture.js';

/**
 * Question -> answer -> next question, or "=class". A short ribbon breaks before 2.5 cm, a
 * middle one before 5 cm.
 *
 * @type {Record<string, Record<string, string>>}
 */
export const FEEL_PATH = {
  ball: { no: '=sand', yes: 'ribbon' },
  ribbon: { none: '=loamy sand', short: 'feel_short', middle: 'feel_middle', long: 'feel_long' },
  feel_short: { gritty: '=sandy loam', smooth: '=silt loam', neither: '=loam' },
  feel_middle: { gritty: '=sandy clay loam', smooth: '=silty clay loam', neither: '=clay loam' },
  feel_long: { gritty: '=sandy clay', smooth: '=silty clay', neither: '=clay' },
};

/** Where the test stands: [next question or null, class or null]. @param {{answers: Record<string, string>}} of */
export function feelStep({ answers }) {
  let question = 'ball';
  while (answers[question] !== undefined) {
    const there = FEEL_PATH[question][answers[question]];
    if (!there) refuse('unknown_choice', { field: question, value: answers[question] });
    if (there.startsWith('=')) return [null, there.slice(1)];
    question = there;
  }
  return [question, null];
}

/** Water held by a layer whose class was felt. @param {{texture: string, organic_matter_pct: number}} of */
export function feelWater({ texture, organic_matter_pct }) {
  const [sand_pct, clay_pct] = classCentre({ texture });
  return mineralWater({ sand_pct, clay_pct, organic_matter_pct });
}

/**
 * Water plants can take from each layer of a pit that was felt. [mm]
 * @param {{layers: {texture: string, thickness_cm: number, organic_matter_pct?: number | null,
 *   stones_vol_pct?: number | null}[]}} of
 */
export function pitWaterMm({ layers }) {
  if (!layers.length) refuse('layers_missing');
  return layers.map(({ texture, thickness_cm, organic_matter_pct, stones_vol_pct }) => {
    const water = feelWater({ texture, organic_matter_pct: organic_matter_pct ?? 1 });
    const stones_share = needPercent('stones_vol_pct', stones_vol_pct ?? 0) / 100;
    return layerWaterMm({ thickness_cm, available: water.field_capacity - water.wilting_point, stones_share });
  });
}

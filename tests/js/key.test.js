/**
 * The phone's key on a pack small enough to reckon by hand. That it agrees with the builder on
 * real packs is tested in the browser, tests/key/test_twins.py.
 *   node --test tests/js/key.test.js
 */
import assert from 'node:assert/strict';
import { test } from 'node:test';
import { call, callThree, lookAlikes, prompts, reasonsBetween, visible, weighFinding } from '../../builder/app/js/core/index.js';
import { round6, roundHalfUp } from '../../builder/app/js/core/rounding.js';

/** Two zones, two plants. Reed: 9 in 10 low, 1 in 10 high. Pine: the other way round, May only. */
function smallPack() {
  const table = (low, high) => [low, [1], [high]];
  const reedLow = [0, 0, 0, 0, 26, -11, -22, -40, -70, -60, -30, -10, 9000];
  const reedHigh = [0, 0, 0, 0, -70, 8, 14, 20, 26, 24, 15, 6, 1000];
  const plant = (id, months) => ({
    id, form: 'tree', layer: 'tree', months, known_when_dry: false, weed: 'none', mix: false,
    fate: 'killed', response: 'neutral', groups: [0], lookalikes: [id === 'reed' ? 1 : 0], price_micronats: 0,
  });
  const zone = (id, neighbours) => ({
    id, letter: id[0], kind: 'zonal', band_m: [100, 200], centre_m: 150, soft_edge_m: 100,
    north_shift_m: -50, south_shift_m: 50, exposed_shift_m: 0, neighbours,
  });
  const usual = { asked_to: 999, surprise: [1, 1], surprise_sd: [1, 1], miss: [0.5, 0.5], miss_sd: [1, 1] };
  const line = { times: 1, plus: -1 };
  return {
    region: { id: 'small' },
    settings: {
      temper: 1, drag: 0.5, drag_cap_answers: 20, uniform_share: 0.02, named_first: 3, implied_weight: 1,
      sure: 0.9, least_gain: 0.001, seen_dry_outside: 0.5, hand_tool_cm: 30, area_cb: [0, 0],
      height: { cap_nats: 2, most_cb: 150 }, thin: { finds_cb: 20, belief: 0.85 }, edge: line, mosaic: line,
      misfit: line, mosaic_share: 0.85, mosaic_lower: 0.3, no_pair_gain: -10, look_again_below: 0.7,
      three: { edge: line, mosaic: line, misfit: line, thin_mean_finds_cb: 0 },
      stand: Object.fromEntries(['zone', 'edge', 'mosaic', 'misfit'].map((name) => [name, { one_kind: 0.5 }])),
      fit: [usual], sides_wanted: 2, side_apart_m: 20,
      heat_load: { constant: 0, cos_l_cos_s: 1, sin_l_sin_s: 0, cos_a_sin_s: -1, steepest_deg: 60, latitude_deg: 0, level: 1, hot: 1, cool: 1 },
    },
    cover: { classes: [{ code: '1', low_pct: 0, high_pct: 5, mid_pct: 2, step: 1 }, { code: '2', low_pct: 5, high_pct: 100, mid_pct: 50, step: 3 }] },
    zones: [zone('low', [1]), zone('high', [0])],
    plants: [plant('reed', [1, 12]), plant('pine', [5, 5])],
    groups: [{ id: 'tall', use: 'answer', members: [0, 1] }],
    evidence: {
      plants: [table(reedLow, reedHigh), table(reedHigh, reedLow)],
      found_share: [[250, 250, 250, 250], [250, 250, 250, 250]],
      groups: [{ found: [0, 0], expected: [9100, 9100] }],
      newcomer: { levels: [], rows: [], tables: [] },
    },
    questions: [{ id: 'wet', kind: 'azonal', asked: true, digs_cm: 50, price_micronats: 0, answers: [
      { value: 'yes', share: 3000, evidence: [20, -30] }, { value: 'no', share: 7000, evidence: [-10, 8] }] }],
    rules: [],
    disturbances: [],
    probes: [],
  };
}

const reed = { plant_id: 'reed', state: 'found', cover: null };
const pine = { plant_id: 'pine', state: 'not_found' };

test('halves go up', () => {
  assert.deepEqual([0.5, -0.5, 2.5, -1.5].map(roundHalfUp), [1, 0, 3, -1]);
  assert.equal(round6(0.1234565), 0.123457);
});

test('two answers: centibans over the drag, softmax, two per cent doubt', () => {
  const made = call(smallPack(), { findings: [reed, pine] });
  const nats = (26 + 26 + 70 + 70) / 1.5 * Math.LN10 / 100;
  const share = 1 / (1 + Math.exp(-nats));
  assert.equal(made.belief.low, round6(0.98 * share + 0.01));
  assert.equal(made.answers, 2);
  assert.equal(made.difference_cb, 128);
  assert.deepEqual(made.reasons.map((one) => [one.kind, one.points_cb]), [['plant', 96], ['plant', 96], ['drag', -64]]);
});

test('reasons turn round with the zones', () => {
  const { difference_cb: there } = reasonsBetween(smallPack(), { findings: [reed] }, 'low', 'high');
  const { difference_cb: back } = reasonsBetween(smallPack(), { findings: [reed] }, 'high', 'low');
  assert.deepEqual([there, back], [96, -96]);
});

test("can't tell and out of season say nothing", () => {
  const bare = call(smallPack(), { month: 7, findings: [reed] });
  const more = [reed, { plant_id: 'pine', state: 'not_found' }];
  assert.deepEqual(call(smallPack(), { month: 7, findings: more }).belief, bare.belief);
  const unsure = [reed, { plant_id: 'pine', state: 'cant_tell' }];
  assert.deepEqual(call(smallPack(), { month: 5, findings: unsure }).belief, bare.belief);
});

test('prompts: in season, dug only when cleared', () => {
  const ids = (site) => prompts(smallPack(), site).map((one) => one.id);
  assert.deepEqual(ids({ month: 5 }).sort(), ['pine', 'reed']);
  assert.deepEqual(ids({ month: 7 }), ['reed']);
  assert.ok(ids({ month: 7, digging: { cleared: 'lines' } }).includes('wet'));
  assert.ok(!ids({ month: 7, digging: { cleared: 'hand' } }).includes('wet'));
});

test('three looks that agree are one zone', () => {
  const look = { findings: [reed, pine] };
  const made = callThree(smallPack(), look, look, look, 'one_kind');
  assert.equal(made.verdict, 'zone');
  assert.equal(made.zone_id, 'low');
});

test('what the screens ask', () => {
  const pack = smallPack();
  assert.deepEqual(lookAlikes(pack, 'reed'), { plants: ['pine'], groups: ['tall'] });
  assert.deepEqual(['reed', 'pine'].map((id) => visible(pack, { month: 7 }, id)), ['now', 'gone']);
  assert.deepEqual(weighFinding(pack, {}, reed).points_cb, { low: 26, high: -70 });
});

/**
 * Planned points read from files, and points drawn by lot.
 *
 *   node --test tests/js/points.test.js
 */
import assert from 'node:assert/strict';
import { test } from 'node:test';
import { readPoints } from '../../builder/app/js/screens/points.js';
import { drawPoints, readShapes } from '../../builder/app/js/screens/random_points.js';

// An outline with a hole: a square of 2 by 2 degrees, its north-east quarter cut out.
const SHAPE = {
  kind: 'area',
  rings: [[[0, 0], [2, 0], [2, 2], [0, 2], [0, 0]], [[1, 1], [2, 1], [2, 2], [1, 2], [1, 1]]],
};

test('waypoints of GPX come with name, position and height', () => {
  const gpx = `<?xml version="1.0"?><gpx version="1.1"><wpt lat="41.1" lon="-110.5"><ele>2440.4</ele><name>P &amp; 1</name></wpt>
    <wpt lon='-110' lat='41.2'/><wpt lat="95" lon="0"/></gpx>`;
  assert.deepEqual(readPoints(gpx), [
    { name: 'P & 1', latitude_deg: 41.1, longitude_deg: -110.5, height_m: 2440 },
    { name: '2', latitude_deg: 41.2, longitude_deg: -110, height_m: null },
  ]);
});

test('GeoJSON has longitude first, RFC 7946 section 3.1.1', () => {
  const file = { type: 'FeatureCollection', features: [
    { type: 'Feature', properties: { name: 'toe' }, geometry: { type: 'Point', coordinates: [-110, 41, 2000.6] } },
    { type: 'Feature', properties: {}, geometry: { type: 'LineString', coordinates: [[0, 0], [1, 1]] } }] };
  assert.deepEqual(readPoints(JSON.stringify(file)), [{ name: 'toe', latitude_deg: 41, longitude_deg: -110, height_m: 2001 }]);
});

test('a file without points gives none and raises nothing', () => {
  for (const text of ['', '{', '[]', 'null', '<gpx/>', '<wpt lat="x" lon="1"/>']) assert.deepEqual(readPoints(text), []);
});

test('the same seed draws the same points, another seed others', () => {
  assert.deepEqual(drawPoints(SHAPE, 5, 42), drawPoints(SHAPE, 5, 42));
  assert.notDeepEqual(drawPoints(SHAPE, 5, 42), drawPoints(SHAPE, 5, 43));
});

test('points lie evenly over the ground and never in the hole', () => {
  const points = drawPoints(SHAPE, 6000, 7);
  assert.equal(points.length, 6000);
  const quarter = ({ longitude_deg: x, latitude_deg: y }) => (x >= 1 ? 1 : 0) + (y >= 1 ? 2 : 0);
  const counts = [0, 0, 0, 0];
  points.forEach((one) => { counts[quarter(one)] += 1; });
  assert.equal(counts[3], 0);
  // Chi-square with two degrees of freedom: 13.8 is passed by chance once in a thousand.
  const expected = 2000;
  const chi = counts.slice(0, 3).reduce((sum, n) => sum + (n - expected) ** 2 / expected, 0);
  assert.ok(chi < 13.8, `chi-square ${chi}`);
});

test('a skewed draw would be seen', () => {
  const counts = [2200, 1900, 1900];
  assert.ok(counts.reduce((sum, n) => sum + (n - 2000) ** 2 / 2000, 0) > 13.8);
});

test('points along a line fall on it, by length and not by vertex', () => {
  const [shape] = readShapes(JSON.stringify({ type: 'LineString', coordinates: [[0, 0], [0, 1], [0, 4]] }));
  const points = drawPoints(shape, 4000, 3);
  assert.ok(points.every((one) => Math.abs(one.longitude_deg) < 1e-12 && one.latitude_deg >= 0 && one.latitude_deg <= 4));
  const first = points.filter((one) => one.latitude_deg < 1).length / points.length;
  assert.ok(Math.abs(first - 0.25) < 0.03, `share on the first quarter ${first}`);
});

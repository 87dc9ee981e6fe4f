/** How the open edge is laid: which belts open, which stay readable, which are pressed into strata.
 *  Always in order, high at the top; ground off the slope stands at its own height. */
import { upslope } from './edge_index.js';
import { lensHeight } from './edge_shut.js';

/** A belt this likely stays readable even away from the called one. */
const READABLE = 0.03;

/** @typedef {{kind: 'open'|'near'|'pressed'|'even'|'gap', zone?: object, zones?: object[], pools?: object[], seam?: boolean}} EdgeRow */

/** Belts that a verdict opens. @returns {string[]} zone ids */
export function opened(call) {
  if (call.verdict === 'zone') return [call.zone_id];
  if (call.verdict === 'edge') return call.pair;
  if (call.verdict === 'mosaic') return call.pair;
  return [];
}

/** Of a mosaic's two, the one drawn as a lens inside the other: ground off the slope, else the less likely. */
export function lensOf(region, call) {
  const off = call.pair.filter((id) => region.zone.get(id).kind === 'azonal');
  if (off.length === 1) return off[0];
  return call.belief[call.pair[0]] >= call.belief[call.pair[1]] ? call.pair[1] : call.pair[0];
}

/** @param {object} region  @param {object} call  @param {boolean} spread show every belt as a row  @returns {EdgeRow[]} high to low */
export function edgeRows(region, call, spread = false) {
  const open = opened(call);
  const inlay = call.verdict === 'mosaic' ? [lensOf(region, call)] : [];
  const wide = open.filter((id) => !inlay.includes(id));
  const shows = (zone) => wide.includes(zone.id) || (!inlay.includes(zone.id) && (spread || call.belief[zone.id] >= READABLE));
  const stack = upslope(region).filter((zone) => zone.kind === 'zonal' || shows(zone));
  const anchors = anchorsOf(call, wide, stack);
  const near = (zone, i) => spread || shows(zone) || anchors.some((at) => Math.abs(at - i) === 1);
  const rows = [];
  stack.forEach((zone, i) => {
    if (wide.includes(zone.id)) rows.push({ kind: 'open', zone });
    else if (near(zone, i)) rows.push({ kind: 'near', zone });
    else if (rows.at(-1)?.kind === 'pressed') rows.at(-1).zones.push(zone);
    else rows.push({ kind: 'pressed', zones: [zone], pools: [] });
  });
  const tidy = rows.map((row) => (row.kind === 'pressed' && row.zones.length === 1 ? { kind: 'near', zone: row.zones[0] } : row));
  markSeam(call, tidy);
  if (call.verdict === 'misfit') openGap(call, tidy);
  placePools(region, tidy, stack, inlay);
  return tidy;
}

function anchorsOf(call, wide, stack) {
  const ids = call.verdict === 'misfit' ? [call.zone_id, call.next_zone_id] : wide;
  return ids.map((id) => stack.findIndex((zone) => zone.id === id)).filter((i) => i >= 0);
}

function markSeam(call, rows) {
  if (call.verdict !== 'edge') return;
  const second = rows.findIndex((row, i) => row.kind === 'open' && rows[i - 1]?.kind === 'open');
  if (second > 0) rows[second].seam = true;
}

/** Where nothing fits, the stack parts below the higher of the two belts that come nearest. */
function openGap(call, rows) {
  const at = rows.findIndex((row) => row.zone && (row.zone.id === call.zone_id || row.zone.id === call.next_zone_id));
  rows.splice(at + 1, 0, { kind: 'gap' });
}

/** Lenses that do not show as rows float in the strata nearest their height. */
function placePools(region, rows, stack, inlay) {
  const hidden = region.lenses.filter((zone) => !stack.includes(zone) && !inlay.includes(zone.id));
  const pressed = rows.filter((row) => row.kind === 'pressed');
  if (hidden.length === 0) return;
  if (pressed.length === 0) {
    rows.push({ kind: 'pressed', zones: [], pools: hidden.reverse() });
    return;
  }
  const count = region.belts.length;
  for (const lens of [...hidden].sort((a, b) => lensHeight(region, b) - lensHeight(region, a))) {
    const height = lensHeight(region, lens) * count;
    const gap = (row) => Math.min(...row.zones.map((zone) => Math.abs(zone.place + 0.5 - height)));
    pressed.reduce((best, row) => (gap(row) < gap(best) ? row : best)).pools.push(lens);
  }
}

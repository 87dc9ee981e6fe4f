/** Where the site stands along the stack of belts, and which belts its height alone allows. */
import { bandOf } from '../core/index.js';

/** @returns {{at: number, reach: [number, number]|null}|null} shares of the stack from its foot; null without a height */
export function heightMark(here, record) {
  const height = record.place.height_m;
  if (height === null) return null;
  const belts = allowed(here, record);
  const count = here.belts.length;
  const reach = belts.length ? [belts[0].place / count, (belts.at(-1).place + 1) / count] : null;
  return { at: along(here, height), reach };
}

/** Belts whose band, moved by slope and facing, holds the height; low to high. */
export function allowed(here, record) {
  const bands = bandOf(here.pack, record);
  const height = record.place.height_m;
  return here.belts.filter((zone) => {
    const band = bands[zone.index];
    return band && height >= band.low_m - zone.soft_edge_m && height <= band.high_m + zone.soft_edge_m;
  });
}

/** How far slope and facing move the belts here, in metres; up is positive. */
export function shiftHere(here, record) {
  const bands = bandOf(here.pack, record);
  const belts = allowed(here, record);
  const zone = belts[Math.floor(belts.length / 2)] ?? here.belts[0];
  return Math.round((bands[zone.index].low_m - zone.band_m[0]) / 10) * 10;
}

/** A height as a share of the stack, each belt's centre at the middle of its strip. */
function along(here, height) {
  const count = here.belts.length;
  const centres = here.belts.map((zone) => zone.centre_m);
  if (height <= centres[0]) return 0.5 / count;
  for (let i = 1; i < count; i += 1) {
    if (height <= centres[i]) {
      const part = centres[i] === centres[i - 1] ? 0 : (height - centres[i - 1]) / (centres[i] - centres[i - 1]);
      return (i - 0.5 + Math.max(0, Math.min(1, part))) / count;
    }
  }
  return (count - 0.5) / count;
}

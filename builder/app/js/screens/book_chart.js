/** The diagonal: each plant's share of plots along the slope as a kite, sorted upslope. Rows are links. */
import { html } from 'htm/preact';
import { t, number } from './words.js';
import { region } from './state.js';
import { occurrenceOf } from './pack_reading.js';

const LEFT = 112;
const WIDE = 378;
const ROW = 46;
const HALF = 20;
const GAP = 8;

/** @returns the whole chart with its head of letters kept in sight */
export function Chart() {
  const here = region.value;
  const columns = [...here.belts, ...here.lenses];
  const step = (WIDE - 6 - LEFT - GAP) / columns.length;
  const x = (i) => LEFT + (i + 0.5) * step + (i >= here.belts.length ? GAP : 0);
  const rows = sorted(here);
  return html`<div class="headcols"><svg viewBox=${`0 0 ${WIDE} 46`} aria-hidden="true"><text class="tick" x="4" y="19">${t('book.low')}</text><text class="tick" x="4" y="38">${t('book.high')}</text>
      ${columns.map((zone, i) => html`<text class="col" x=${x(i)} y="19" text-anchor="middle">${zone.letter}</text>${zone.kind === 'zonal'
        ? html`<rect class="swatch" x=${x(i) - step / 2 + 0.5} y="25" width=${step - 1} height="15" fill=${`url(#p-${zone.letter})`}/>` : html`<ellipse class="swatch" cx=${x(i)} cy="32.5" rx=${step / 2 - 0.8} ry="7.5" fill=${`url(#p-${zone.letter})`}/>`}`)}</svg></div>
    <ul class="kites">${rows.map(({ plant, shares }) => html`<li key=${plant.id}><a href=${`#/book/plant/${plant.id}`} aria-label=${spoken(here, plant, shares)}>
      <span class="kitename">${plant.common}</span><svg viewBox=${`0 0 ${WIDE} ${ROW}`} aria-hidden="true">${columns.map((zone, i) => html`<path class="fall" d=${`M${x(i) - step / 2} 0v${ROW}`}/>`)}
        <path class="base" d=${`M${LEFT} ${ROW / 2}H${WIDE - 6}`}/><path class="kite" d=${kite(here.belts.map((zone, i) => [x(i), shares[zone.index]]), step)}/>
        ${here.lenses.map((zone, i) => html`<path class="kite off" d=${kite([[x(here.belts.length + i), shares[zone.index]]], step)}/>`)}</svg></a></li>`)}</ul>`;
}

/** Mirrored outline through the shares; it comes to a point half a column beyond its ends. */
export function kite(points, step) {
  const middle = ROW / 2;
  const pieces = [];
  let run = [];
  for (const point of [...points, [0, 0]]) {
    if (point[1] > 0) run.push(point);
    else if (run.length) {
      pieces.push(run);
      run = [];
    }
  }
  return pieces.map((one) => {
    const up = one.map(([at, share]) => `L${at.toFixed(1)} ${(middle - share * HALF).toFixed(1)}`).join('');
    const down = [...one].reverse().map(([at, share]) => `L${at.toFixed(1)} ${(middle + share * HALF).toFixed(1)}`).join('');
    return `M${(one[0][0] - step / 2).toFixed(1)} ${middle}${up}L${(one.at(-1)[0] + step / 2).toFixed(1)} ${middle}${down}z`;
  }).join('');
}

/** Plants by their mean place up the slope; those only off the slope come last. */
function sorted(here) {
  const rows = here.plants.map((plant, p) => {
    const shares = here.pack.zones.map((_, z) => occurrenceOf(here, p, z).constancy_pct / 100);
    const on = here.belts.reduce((sum, zone) => sum + shares[zone.index], 0);
    const place = on > 0 ? here.belts.reduce((sum, zone) => sum + zone.place * shares[zone.index], 0) / on : here.belts.length + here.lenses.findIndex((zone) => shares[zone.index] > 0);
    return { plant, shares, place };
  });
  return rows.filter((row) => row.shares.some((share) => share > 0)).sort((a, b) => a.place - b.place);
}

function spoken(here, plant, shares) {
  const list = here.zones.filter((zone) => shares[zone.index] > 0).map((zone) => `${zone.short} ${number(shares[zone.index] * 100)} %`).join(', ');
  return t('book.kite', { name: plant.common, list });
}

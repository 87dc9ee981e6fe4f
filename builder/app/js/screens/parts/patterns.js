/** One hidden SVG with a pattern per belt. A belt's letter picks its marks; letters beyond the set
 *  repeat the marks and take a colour stepped evenly along the same path. */
import { html } from 'htm/preact';

const STEPS = 'ABCDEFGHJKLM';
const OFF = 'WXYZ';
const LINE = {
  A: [18, 'M2 5h7M11 14h6'], C: [16, 'M2 3l2.4 5 2.4-5M10 10l2.4 5 2.4-5'],
  D: [16, 'M0 .6h16M0 8.6h16M4 .6v8M12 8.6v8'],
  E: [18, 'M8 5a3.4 3.4 0 1 1-6.8 0a3.4 3.4 0 1 1 6.8 0zM17 14a3.4 3.4 0 1 1-6.8 0a3.4 3.4 0 1 1 6.8 0z'],
  G: [12, 'M3 0v8M9 6v8M9-6v8'], H: [16, 'M1 4.4q3.2-3.6 6.4 0M4.2 4v3.6M9 12.4q3.2-3.6 6.4 0M12.2 12v3.6'],
  J: [16, 'M1 7l3.2-5 3.2 5M9 15l3.2-5 3.2 5'], K: [12, 'M3 0v12M9 0v12M3 3h2.6M9 9h2.6'],
  L: [10, 'M1 4.4l2.4-4 2.4 4M1 9.4l2.4-4 2.4 4M6.2 6.9l2.4-4 2.4 4M6.2 1.9l2.4-4 2.4 4M6.2 11.9l2.4-4 2.4 4'],
  M: [18, 'M1 6q4-3.4 8 0M10 15q4-3.4 8 0M11 4h5M2 13h5'],
  W: [14, 'M0 4q3.5-3 7 0t7 0'], X: [16, 'M0 11h8v-6h8'],
  Y: [14, 'M0 3.5q3.5-3 7 0t7 0M0 10.5q3.5-3 7 0t7 0'],
  Z: [16, 'M1 7h8M3 7v-3M5 7v-4.4M7 7v-3M9 15h7M10.5 15v-3M12.5 15v-4.4M14.5 15v-3'],
};
const DOTS = {
  B: [10, 1, [[2.5, 2.5], [7.5, 7.5]]],
  F: [16, 1.6, [[3, 5], [6.6, 5], [4.8, 2], [11, 13], [14.6, 13], [12.8, 10]]],
  W: [14, 1, [[3.5, 10], [10.5, 10]]],
};
const LIGHT = 'ABCDEFGWX';

/** The letter whose marks a zone wears, given its place among the zones of its kind. */
export function marksOf(zone, place) {
  const set = zone.kind === 'azonal' ? OFF : STEPS;
  return set.includes(zone.letter) ? zone.letter : set[place % set.length];
}

/** CSS colour of a zone: its letter's own, or a step between two of them. */
export function colourOf(zone, place, count) {
  const set = zone.kind === 'azonal' ? OFF : STEPS;
  if (set.includes(zone.letter) && count <= set.length) return `var(--belt-${zone.letter.toLowerCase()})`;
  const along = count > 1 ? (place * (set.length - 1)) / (count - 1) : 0;
  const low = Math.floor(along);
  const high = Math.min(low + 1, set.length - 1);
  const share = Math.round((along - low) * 100);
  return `color-mix(in srgb, var(--belt-${set[high].toLowerCase()}) ${share}%, var(--belt-${set[low].toLowerCase()}))`;
}

function Pattern({ zone }) {
  const marks = zone.marks;
  const [size] = LINE[marks] ?? DOTS[marks];
  const ink = { [LINE[marks] ? 'stroke' : 'fill']: `var(--mark-${LIGHT.includes(marks) ? 'low' : 'high'})` };
  const dots = DOTS[marks];
  return html`<pattern id=${`p-${zone.letter}`} width=${size} height=${size} patternUnits="userSpaceOnUse">
    <rect width=${size} height=${size} style=${{ fill: zone.colour }}/>
    <g style=${{ opacity: 'var(--mark-share)' }}>
      ${LINE[marks] && html`<path d=${LINE[marks][1]} fill="none" stroke-width="1.3" style=${ink}/>`}
      ${dots && dots[2].map(([x, y]) => html`<circle cx=${x} cy=${y} r=${dots[1]} style=${{ fill: 'var(--mark-low)' }}/>`)}
    </g></pattern>`;
}

/** All patterns of a region, once on the page. @param {{zones: {letter: string, marks: string, colour: string}[]}} props */
export function Patterns({ zones }) {
  return html`<svg class="defs" aria-hidden="true"><defs>${zones.map((zone) => html`<${Pattern} zone=${zone}/>`)}</defs></svg>`;
}

/** A rectangle filled with a zone's pattern. @param {{letter: string}} props */
export function Fill({ letter }) {
  return html`<svg aria-hidden="true"><rect width="100%" height="100%" fill=${`url(#p-${letter})`}/></svg>`;
}

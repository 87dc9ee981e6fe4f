/** Cover hoops: round pictures whose dark share is the middle of a cover class.
 *  Leaves are closed curves of known area laid without overlap; above one half the gaps are drawn
 *  instead. The path is scaled to the exact share, so the picture cannot drift from the scale. */
import { html } from 'htm/preact';

const RADIUS = 46;
const CENTRE = 50;
const LOBES = 7;

/** Repeatable numbers in 0..1 (linear congruential, Numerical Recipes constants). */
function dice(seed) {
  let state = seed >>> 0;
  return () => {
    state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
    return state / 4294967296;
  };
}

/** Control points of a leaf about 0,0 with reach at most `radius`. */
function leaf(radius, roll) {
  const turn = roll() * Math.PI;
  return Array.from({ length: LOBES * 2 }, (_, i) => {
    const reach = radius * (i % 2 ? 0.86 + roll() * 0.04 : 1);
    const angle = turn + (i * Math.PI) / LOBES;
    return [reach * Math.cos(angle), reach * Math.sin(angle)];
  });
}

const middle = (a, b) => [(a[0] + b[0]) / 2, (a[1] + b[1]) / 2];
const cross = (a, b) => a[0] * b[1] - a[1] * b[0];

/** Exact area of the closed quadratic spline through the middles of its control points. */
export function splineArea(points) {
  let twice = 0;
  points.forEach((point, i) => {
    const from = middle(points.at(i - 1), point);
    const to = middle(point, points[(i + 1) % points.length]);
    twice += (2 / 3) * (cross(from, point) + cross(point, to)) + (1 / 3) * cross(from, to);
  });
  return Math.abs(twice) / 2;
}

/** Circles [x, y, r] inside the hoop that do not touch, largest first; their area is `share` of the hoop. */
function scatter(share, seed) {
  const roll = dice(seed);
  const n = Math.max(3, Math.round(4 + share * 34));
  const sizes = Array.from({ length: n }, (_, i) => 1 - (0.55 * i) / n);
  const unit = Math.sqrt((share * RADIUS * RADIUS) / (0.87 * sizes.reduce((sum, s) => sum + s * s, 0)));
  const placed = [];
  for (const size of sizes) {
    const r = unit * size;
    for (let i = 0; i < 4000; i += 1) {
      const far = (RADIUS - r - 2) * Math.sqrt(roll());
      const angle = roll() * 2 * Math.PI;
      const x = CENTRE + far * Math.cos(angle);
      const y = CENTRE + far * Math.sin(angle);
      if (placed.every((other) => Math.hypot(other[0] - x, other[1] - y) > (other[2] + r) * 0.97)) {
        placed.push([x, y, r]);
        break;
      }
    }
  }
  return { placed, roll };
}

/** Path of leaves covering `share` (0..0.5) of the hoop, exactly. */
export function leavesPath(share, seed) {
  const { placed, roll } = scatter(share, seed);
  const leaves = placed.map(([x, y, r]) => ({ x, y, points: leaf(r, roll) }));
  const drawn = leaves.reduce((sum, one) => sum + splineArea(one.points), 0);
  const scale = Math.sqrt((share * Math.PI * RADIUS * RADIUS) / drawn);
  return leaves.map(({ x, y, points }) => {
    const at = points.map(([px, py]) => [x + px * scale, y + py * scale]);
    const start = middle(at.at(-1), at[0]);
    const curves = at.map((point, i) => `Q${point.map(round)} ${middle(point, at[(i + 1) % at.length]).map(round)}`);
    return `M${start.map(round)}${curves.join('')}z`;
  }).join('');
}

const round = (value) => Math.round(value * 100) / 100;
const drawn = new Map();

function pathFor(midPct) {
  if (!drawn.has(midPct)) {
    const share = midPct / 100;
    drawn.set(midPct, leavesPath(share > 0.5 ? 1 - share : share, Math.round(midPct * 10) + 7));
  }
  return drawn.get(midPct);
}

/** @param {{mid_pct: number|null}} props null: searched and not there */
export function Hoop({ mid_pct: midPct }) {
  if (midPct === null) {
    return html`<svg class="disc" viewBox="0 0 100 100" aria-hidden="true"><circle class="ground" cx="50" cy="50" r="46"/>
      <path class="none" d="M22 22L78 78"/><circle class="hoop" cx="50" cy="50" r="46"/></svg>`;
  }
  const gaps = midPct > 50;
  return html`<svg class=${`disc ${gaps ? 'gaps' : ''}`} viewBox="0 0 100 100" aria-hidden="true"><circle class=${gaps ? 'plant' : 'ground'} cx="50" cy="50" r="46"/>
    <path class=${gaps ? 'ground' : 'plant'} d=${pathFor(midPct)}/><circle class="hoop" cx="50" cy="50" r="46"/></svg>`;
}

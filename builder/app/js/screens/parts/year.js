/** Twelve columns: work as belt bars, warm and moist months as a pale one, today as a blue line. */
import { html } from 'htm/preact';
import { t, monthName } from '../words.js';

const LEFT = 4;
const COLUMN = 29.17;
const TOP = 24;
const ROW = 48;

/** Months in a row as runs [from, to], across the turn of the year in two pieces. @param {number[]} months 1..12 */
export function runs(months) {
  const has = new Set(months);
  const found = [];
  for (let month = 1; month <= 12; month += 1) {
    if (!has.has(month)) continue;
    if (found.length && found.at(-1)[1] === month - 1) found.at(-1)[1] = month;
    else found.push([month, month]);
  }
  return found;
}

/** @param {{rows: {label: string, months: number[], letter: string|null}[], today: string}} props letter: pattern of the bar, null for pale */
export function YearWork({ rows, today }) {
  const height = TOP + rows.length * ROW + 4;
  const [, month, day] = today.split('-').map(Number);
  const now = LEFT + (month - 1 + (day - 1) / 31) * COLUMN;
  const names = Array.from({ length: 12 }, (_, i) => monthName(i + 1, 'narrow'));
  return html`<svg class="year" viewBox=${`0 0 358 ${height}`} role="img" aria-label=${rows.map((row) => t('year.row', { label: row.label, months: monthsWords(row.months) })).join(' ')}>
    ${names.map((name, i) => html`<text class="m" x=${LEFT + (i + 0.5) * COLUMN} y="16">${name}</text><path class="cell" d=${`M${LEFT + i * COLUMN} ${TOP}V${height - 4}`}/>`)}<path class="cell" d=${`M354 ${TOP}V${height - 4}`}/>
    ${rows.map((row, i) => html`<text x=${LEFT} y=${TOP + i * ROW + 20} class="halo">${row.label}</text>
      ${runs(row.months).map(([from, to]) => html`<rect class=${`run ${row.letter ? '' : 'pale'}`} x=${LEFT + (from - 1) * COLUMN} y=${TOP + i * ROW + 26} width=${(to - from + 1) * COLUMN} height="20" fill=${row.letter ? `url(#p-${row.letter})` : undefined}/>`)}`)}
    <path class="nowline" d=${`M${now} 28V${height - 4}`}/><path class="now" d=${`M${now} 30l-8-11h16z`}/></svg>`;
}

/** "November to February", "May, and July to September". @param {number[]} months */
export function monthsWords(months) {
  if (months.length === 0) return t('year.never');
  const pieces = runs(months);
  if (pieces.length > 1 && pieces[0][0] === 1 && pieces.at(-1)[1] === 12) {
    const first = pieces.shift();
    pieces.at(-1)[1] = first[1];
  }
  return pieces.map(([from, to]) => (from === to ? monthName(from) : t('year.span', { from: monthName(from), to: monthName(to) }))).join(', ');
}

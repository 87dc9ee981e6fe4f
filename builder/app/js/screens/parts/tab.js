/** Letter tabs: a pattern round a label, and the five verdicts in the same small shape. */
import { html } from 'htm/preact';
import { t } from '../words.js';
import { Fill } from './patterns.js';

/** One zone's letter on its pattern. @param {{zone: object, size?: 'small'|'big'|''}} props */
export function Tab({ zone, size = '' }) {
  return html`<span class=${`tab ${size}`} role="img" aria-label=${zone.short}><${Fill} letter=${zone.letter}/><b>${zone.letter}</b></span>`;
}

/** A verdict in the shape of a tab. @param {{call: object|null, zones: Map<string, object>}} props */
export function VerdictTab({ call, zones }) {
  const [first, second] = call?.pair ?? [call?.zone_id, call?.next_zone_id];
  const zone = zones.get(first);
  const other = zones.get(second);
  if (!zone || call.verdict === 'thin') {
    return html`<span class="tab big thin" aria-hidden="true"><svg viewBox="0 0 44 44">
      ${[8, 15, 22, 29, 36].map((y) => html`<path d=${`M0 ${y}h44`}/>`)}</svg></span>`;
  }
  if (call.verdict === 'misfit') return html`<span class="tab big void" aria-hidden="true"><b>${t('tab.none')}</b></span>`;
  if (call.verdict === 'edge' && other) return html`<${Halves} high=${upper(zone, other)} low=${lower(zone, other)}/>`;
  if (call.verdict === 'mosaic' && other) return zone.kind === 'azonal' ? html`<${Patch} zone=${other} lens=${zone}/>` : html`<${Patch} zone=${zone} lens=${other}/>`;
  return html`<span class="tab big" aria-hidden="true"><${Fill} letter=${zone.letter}/><b>${zone.letter}</b></span>`;
}

const upper = (a, b) => (a.place >= b.place ? a : b);
const lower = (a, b) => (a.place >= b.place ? b : a);

function Halves({ high, low }) {
  return html`<span class="tab big two" aria-hidden="true">
    <i class="half"><${Fill} letter=${high.letter}/></i><i class="half"><${Fill} letter=${low.letter}/></i>
    <b>${high.letter}</b><b>${low.letter}</b></span>`;
}

function Patch({ zone, lens }) {
  return html`<span class="tab big patch" aria-hidden="true"><${Fill} letter=${zone.letter}/><b>${zone.letter}</b>
    <i><${Fill} letter=${lens.letter}/><b>${lens.letter}</b></i></span>`;
}

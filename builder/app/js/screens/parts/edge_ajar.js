/** The fore-edge ajar: each belt flooded by belief from the page edge, lenses filled from below.
 *  Always in sight while answering; a tap opens the Zone page. */
import { html } from 'htm/preact';
import { t } from '../words.js';
import { percentWords } from '../say.js';
import { Fill } from './patterns.js';
import { lensHeight } from './edge_shut.js';

const LENS_PCT = 10.3;

/** @param {{region: object, call: object|null, mark: object|null, href: string}} props
 *  mark: {at: 0..1 own height along the stack, low, high: 0..1 reach by height alone} */
export function EdgeAjar({ region, call, mark, href }) {
  const asked = call && call.answers > 0;
  const share = (zone) => (asked ? call.belief[zone.id] : 0);
  return html`<a class="edge ajar" href=${href}><span class="spoken">${edgeWords(region, call)}</span>
    <span class="belts" aria-hidden="true">
      ${[...region.belts].reverse().map((zone) => html`<${Belt} key=${zone.id} zone=${zone} share=${share(zone)}/>`)}
      <${Wobble} count=${region.belts.length}/>
    </span>
    <span class="lenses" aria-hidden="true">
      ${region.lenses.map((zone) => html`<${Lens} key=${zone.id} zone=${zone} share=${share(zone)} bottom=${lensHeight(region, zone) * (100 - LENS_PCT)}/>`)}
      ${mark?.reach && !asked && html`<span class="reach" style=${{ bottom: `${mark.reach[0] * 100}%`, height: `${(mark.reach[1] - mark.reach[0]) * 100}%` }}></span>`}
      ${mark && html`<span class="here-mark" style=${{ bottom: `${mark.at * 100}%` }}></span>`}
    </span></a>`;
}

function Belt({ zone, share }) {
  return html`<span class="belt" style=${{ '--b': zone.colour }}>
    <i class="fill" style=${{ '--s': level(share, 0.008) }}><${Fill} letter=${zone.letter}/></i>
    <b>${zone.letter}</b>${share >= 0.1 && html`<em>${percentWords(share)}</em>`}</span>`;
}

function Lens({ zone, share, bottom }) {
  return html`<span class="lens" style=${{ bottom: `${bottom}%`, height: `${LENS_PCT}%` }}>
    <i class="fill" style=${{ '--s': level(share, 0.02) }}><${Fill} letter=${zone.letter}/></i><b>${zone.letter}</b></span>`;
}

/** How far a fill is drawn in: its share, or a sliver that can still be seen; a whole step out at none. */
const level = (share, least) => (share > 0 ? Math.max(share, least).toFixed(4) : -0.1);

/** Hand-drawn seams between belts; the same wobble every time. */
function Wobble({ count }) {
  const line = (i) => {
    const y = i * 100;
    const off = (k) => Math.sin(i * 7.3 + k * 2.9) * 3;
    return `M0 ${y + off(0)}C30 ${y + off(1)} 62 ${y + off(2)} 100 ${y + off(3)}`;
  };
  const seams = Array.from({ length: count - 1 }, (_, i) => line(i + 1)).join('');
  return html`<svg class="wobble" viewBox=${`0 0 100 ${count * 100}`} preserveAspectRatio="none" aria-hidden="true"><path d=${seams}/></svg>`;
}

/** What the column says, for those who hear it. */
export function edgeWords(region, call) {
  if (!call || call.answers === 0) return t('edge.nothing');
  const lead = [...region.zones].sort((a, b) => call.belief[b.id] - call.belief[a.id])[0];
  return t('edge.leads', { zone: lead.short, share: percentWords(call.belief[lead.id]) });
}

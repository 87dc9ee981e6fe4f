/** The fore-edge open: the answer is read at its height, between its neighbours. */
import { html } from 'htm/preact';
import { useState } from 'preact/hooks';
import { sentence, t } from '../words.js';
import { oddsWords, percentWords } from '../say.js';
import { Fill } from './patterns.js';
import { edgeRows, lensOf } from './edge_rows.js';

/** @param {{region: object, call: object, rival: string|null, onRival: (id: string) => void, children?: unknown}} props
 *  children: what stands inside the opened belt under its name */
export function EdgeOpen({ region, call, rival, onRival, children }) {
  const [spread, setSpread] = useState(false);
  const rows = edgeRows(region, call, spread);
  const half = call.verdict !== 'zone';
  return html`<ol class="edge open" aria-label=${t('zone.stack')}>${rows.map((row) => {
    if (row.kind === 'open') return html`<${Opened} key=${row.zone.id} row=${row} call=${call} region=${region} half=${half}>${children}</${Opened}>`;
    if (row.kind === 'near') return html`<${Near} key=${row.zone.id} zone=${row.zone} share=${call.belief[row.zone.id]} rival=${rival} onRival=${onRival}/>`;
    if (row.kind === 'gap') return html`<li class="gap" key="gap"><div>${children}</div></li>`;
    return html`<${Pressed} key=${row.zones[0]?.id ?? 'pools'} row=${row} call=${call} onSpread=${() => setSpread(true)}/>`;
  })}${spread && html`<li class="shutter"><button type="button" class="btn plain" onClick=${() => setSpread(false)}>${t('zone.press')}</button></li>`}</ol>`;
}

/** Letter on its pattern at the side of a row; ground off the slope is a lens. */
function Side({ zone }) {
  return html`<span class=${`tab side ${zone.kind === 'azonal' ? 'off' : ''}`} aria-hidden="true"><${Fill} letter=${zone.letter}/><b>${zone.letter}</b></span>`;
}

function Track({ zone, share }) {
  return share >= 0.005 && html`<span class="track"><span class="fill" style=${{ width: `${share * 100}%`, '--b': zone.colour }}></span></span>`;
}

function Opened({ row, call, region, half, children }) {
  const { zone } = row;
  const share = call.belief[zone.id];
  const lens = call.verdict === 'mosaic' ? region.zone.get(lensOf(region, call)) : null;
  return html`<li class=${`opened ${half ? 'half' : ''} ${row.seam ? 'seamed' : ''}`}>${row.seam && html`<${Seam}/>`}<${Side} zone=${zone}/><${Track} zone=${zone} share=${share}/>
    <div class="said"><h2>${half ? zone.short : zone.name}</h2>
      ${call.verdict === 'edge' && html`<p class="odds"><b>${sentence(oddsWords(share))}</b></p>`}
      ${!half && children}
      ${lens && html`<p class="inlay"><span class="pool big"><${Fill} letter=${lens.letter}/><b>${lens.letter}</b></span><span><b class="lensname">${lens.short}</b>${lens.one_line && html`<span class="small">${lens.one_line}</span>`}</span></p>`}
    </div></li>`;
}

function Near({ zone, share, rival, onRival }) {
  return html`<li class="near"><button type="button" aria-pressed=${String(rival === zone.id)} onClick=${() => onRival(zone.id)}>
    <${Side} zone=${zone}/><${Track} zone=${zone} share=${share}/><span class="name">${zone.short}</span><span class="pc">${percentWords(share)}</span><span class="spoken">${t('zone.beside')}</span></button></li>`;
}

function Pressed({ row, call, onSpread }) {
  const { zones, pools } = row;
  const total = [...zones, ...pools].reduce((sum, zone) => sum + call.belief[zone.id], 0);
  const share = percentWords(total);
  const words = zones.length ? t('zone.pressed', { low: zones.at(-1).letter, high: zones[0].letter, share }) : t('zone.pools', { share });
  return html`<li class="pressed"><span class="strata" aria-hidden="true">${zones.map((zone) => html`<i><${Fill} letter=${zone.letter}/></i>`)}</span>
    <button type="button" class="said" onClick=${onSpread}>${words}</button>
    ${pools.map((zone) => html`<span class="pool" aria-hidden="true"><${Fill} letter=${zone.letter}/><b>${zone.letter}</b></span>`)}</li>`;
}

/** The heavy wavy seam of an edge. */
function Seam() {
  const waves = Array.from({ length: 11 }, (_, i) => `q${i % 2 ? '9 7' : '9 -7'} 18 0t18 0`).join('');
  return html`<svg class="seam" viewBox="0 0 390 14" preserveAspectRatio="none" aria-hidden="true"><path d=${`M0 7${waves}`}/></svg>`;
}

/** Every belt alike, none opened: too little to say, or nothing asked yet.
 *  @param {{region: object, call: object, asked: boolean, mark: object|null, rival: string|null, onRival: (id: string) => void}} props */
export function EdgeEven({ region, call, asked, mark, rival, onRival }) {
  return html`<div class="over"><ol class="edge open" aria-label=${t('zone.stack')}>${[...region.belts].reverse().map((zone) => {
    const share = asked ? call.belief[zone.id] : 0;
    const inner = html`<${Side} zone=${zone}/><${Track} zone=${zone} share=${share}/><span class="name">${zone.short}</span>${asked && html`<span class="pc">${percentWords(share)}</span><span class="spoken">${t('zone.beside')}</span>`}`;
    return html`<li class="even" key=${zone.id}>${asked
      ? html`<button type="button" aria-pressed=${String(rival === zone.id)} onClick=${() => onRival(zone.id)}>${inner}</button>`
      : html`<div>${inner}</div>`}</li>`;
  })}</ol>${!asked && mark?.reach && html`<${Bracket} reach=${mark.reach}/>`}</div>`;
}

/** What height alone allows, bracketed in brown. */
function Bracket({ reach: [low, high] }) {
  return html`<span class="bracket" aria-hidden="true" style=${{ bottom: `${low * 100}%`, height: `${(high - low) * 100}%` }}></span>
    <span class="say" style=${{ bottom: `${((low + high) / 2) * 100}%` }}>${t('zone.by_height')}</span>`;
}

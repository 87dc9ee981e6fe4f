/** Patch shares of a mosaic: how much of the site each kind of ground takes, together 100. */
import { html } from 'htm/preact';
import { t } from './words.js';
import { change, region, site } from './state.js';
import { Stepper } from './parts/choice.js';

const STEP = 5;

/** @param {{pair: string[]}} props zone ids */
export function PatchShares({ pair }) {
  const [a, b] = pair.map((id) => region.value.zone.get(id));
  const kept = site.value.patches;
  const first = kept?.[a.id] ?? 100 - (kept?.[b.id] ?? 50);
  const set = (value) => {
    const now = Math.max(STEP, Math.min(100 - STEP, value));
    change({ patches: { [a.id]: now, [b.id]: 100 - now } }, t('undo.patches'));
  };
  const cut = first * 2;
  return html`<p class="small">${t('patches.ask')}</p><${Stepper} less=${t('patches.less', { zone: a.short })} more=${t('patches.more', { zone: a.short })} onLess=${() => set(first - STEP)} onMore=${() => set(first + STEP)}>
    <svg viewBox="0 0 200 60" role="img" aria-label=${t('patches.shares', { a: a.short, n: first, b: b.short, m: 100 - first })}>
      <rect class="patchbar" x="0" y="16" width=${cut} height="28" fill=${`url(#p-${a.letter})`}/><rect class="patchbar" x=${cut} y="16" width=${200 - cut} height="28" fill=${`url(#p-${b.letter})`}/>
      <path class="mineline" d=${`M${cut} 8v44`}/><text x=${Math.max(16, cut / 2)} y="10">${a.letter} ${first}</text><text x=${Math.min(184, 100 + cut / 2)} y="10">${b.letter} ${100 - first}</text></svg></${Stepper}>`;
}

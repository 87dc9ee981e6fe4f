/** Which zone, or zones with what weight, Production and Reclaim stand on: the person's own word
 *  first, then patch shares, then the belief of the call. */
import { html } from 'htm/preact';
import { t } from './words.js';
import { call, region, site } from './state.js';
import { oddsWords, percentWords } from './say.js';
import { Icon } from './parts/icon.js';
import { Tab } from './parts/tab.js';
import { Untested } from './parts/table_marks.js';

/** @returns {{zone: object, weights: Map<string, number>, share: number, own: boolean}|null} null before anything is asked, and when thin */
export function standing() {
  const record = site.value;
  const here = region.value;
  if (record.overruled) {
    const zone = here.zone.get(record.overruled.zone_id);
    return { zone, weights: new Map([[zone.id, 1]]), share: 1, own: true };
  }
  // Three looks together outweigh the one, as long as its answers are the same.
  const kept = record.call;
  const answer = kept?.looks === 3 && kept.answers === call.value.answers ? kept : call.value;
  if (answer.answers === 0 || answer.verdict === 'thin') return null;
  const weights = record.patches && answer.verdict === 'mosaic'
    ? new Map(Object.entries(record.patches).map(([id, pct]) => [id, pct / 100]))
    : new Map(Object.entries(answer.belief));
  return { zone: here.zone.get(answer.zone_id), weights, share: answer.belief[answer.zone_id], own: false };
}

/** The called zone as a strip under the head: a tap goes back to Zone. */
export function CalledStrip({ stand }) {
  if (!stand) return html`<section class="part lead0 stack"><p class="verdict">${t('called.none')}</p><p>${t('called.none_why')}</p>
    <p class="deep"><a class="btn go" href=${`#/site/${site.value.id}/plants`}><${Icon} name="plants"/>${t('called.ask')}</a></p></section>`;
  const { zone, share, own } = stand;
  return html`<a class="called" href=${`#/site/${site.value.id}/zone`}><span class="fill" style=${{ width: `${share * 100}%`, '--b': zone.colour }}></span><${Tab} zone=${zone}/>
    <span class="what"><b>${zone.short}</b><small>${own ? t('called.own') : t('called.line', { share: percentWords(share), odds: oddsWords(share), n: call.value.answers })}</small></span><${Icon} name="next"/></a>${!own && html`<div class="part tight"><${Untested}/></div>`}`;
}

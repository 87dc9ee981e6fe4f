/** "Whole plot searched": only then are plants not listed taken as not there. Helps to pace the plot. */
import { html } from 'htm/preact';
import { t, number } from './words.js';
import { change, region, site } from './state.js';
import { heightWords } from './say.js';

/** @returns the switch with how far to pace */
export function SearchedAll() {
  const on = site.value.whole_plot_searched;
  const turn = () => change({ whole_plot_searched: !on }, t(on ? 'undo.not_searched' : 'undo.searched'));
  return html`<div class="searched"><button type="button" class="switch" role="switch" aria-checked=${String(on)} onClick=${turn}><i></i><span>${t('searched.key')}</span></button>
    <p class="small">${t(on ? 'searched.on' : 'searched.off')}</p><p class="small quiet">${pacing(region.value.pack.region.plots_behind)}</p></div>`;
}

/** How to pace the plot that the constancies stand on. */
export function pacing(plot) {
  if (!plot) return '';
  const { area_m2: area, shape, search_minutes: minutes } = plot;
  const reach = shape === 'circle' ? Math.sqrt(area / Math.PI) : Math.sqrt(area);
  return t(`searched.${shape === 'circle' ? 'circle' : 'square'}`, { area: number(area), reach: number(reach, 1), metres: heightWords(reach), minutes: minutes ?? '' });
}

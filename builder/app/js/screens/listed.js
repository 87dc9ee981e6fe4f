/** Listed: every finding so far, the latest first; a tap opens it again. */
import { html } from 'htm/preact';
import { t } from './words.js';
import { region, site } from './state.js';
import { findingWords } from './say.js';
import { isOffSeason, nameOf } from './findings.js';
import { Hoop } from './parts/hoop.js';
import { Icon } from './parts/icon.js';
import { SearchedAll } from './searched.js';
import { UndoLine } from './parts/undo_line.js';

/** @param {{root: string}} props */
export function Listed({ root }) {
  const here = region.value;
  const rows = [...site.value.findings].reverse();
  return html`<div class="found"><h2 class="head">${t('listed.title')}</h2>
    ${rows.length === 0 && html`<p class="quiet">${t('listed.empty')}</p>`}
    <ul>${rows.map((one) => html`<li key=${one.plant_id ?? one.group_id}><a class="row" href=${`${root}/enter/${one.plant_id ?? one.group_id}`}>
      <${Picture} finding=${one} region=${here}/><span class="what">${nameOf(here, one)}${one.named ? html` <span class="label">${t('listed.named', { n: one.named })}</span>` : ''}${isOffSeason(here, site.value, one) ? html`<span class="small quiet">${t('listed.off_season')}</span>` : ''}</span>
      <b class="mine">${findingWords(here, one)}</b></a></li>`)}</ul>
    <${SearchedAll}/><${UndoLine}/></div>`;
}

/** The hoop of a finding, or a mark for "can’t tell". */
export function Picture({ finding, region: here }) {
  if (finding.state === 'cant_tell') return html`<span class="state"><${Icon} name="minus"/></span>`;
  return html`<${Hoop} mid_pct=${finding.state === 'found' ? here.coverOf.get(finding.cover)?.mid_pct ?? here.cover[0].mid_pct : null}/>`;
}

/** The frame of a site check page: head, the edge in sight, the page, the five tabs.
 *  Where there is room, the open edge and its reasons stand beside the page instead. */
import { html } from 'htm/preact';
import { t } from '../words.js';
import { call, region, site } from '../state.js';
import { wide } from '../wide.js';
import { heightMark } from '../height_mark.js';
import { ZonePane } from '../zone_pane.js';
import { Bar } from './bar.js';
import { EdgeAjar } from './edge_ajar.js';
import { Foot } from './foot.js';

/** @param {{tab: string, line: string, edge?: boolean, class?: string, back?: string, title?: string, act?: unknown, children: unknown}} props
 *  edge: show the belt column (Place and Plants); act: keys that stay under the thumb, below what rolls */
export function Frame({ tab, line, edge = true, class: shape = '', back = '#/sites', title, act, children }) {
  const here = region.value;
  const record = site.value;
  const two = wide.value;
  return html`<div class=${`page p-${tab} ${two ? 'two' : ''}`}>
    <${Bar} title=${title ?? (record.name || t('sites.unnamed'))} line=${line} back=${back}/>
    ${two && html`<aside class="left" aria-label=${t('zone.title')}><${ZonePane}/></aside>`}
    ${!two && edge && html`<aside class="asis" aria-label=${t('edge.label')}><${EdgeAjar} region=${here} call=${call.value} mark=${heightMark(here, record)} href=${`#/site/${record.id}/zone`}/></aside>`}
    <main class=${`${shape} ${act ? 'acts' : ''}`}>${act ? html`<div class="rolls">${children}</div>${act}` : children}</main>
    <${Foot} current=${tab} siteId=${record.id}/></div>`;
}

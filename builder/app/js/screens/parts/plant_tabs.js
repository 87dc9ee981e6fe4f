/** The three ways to enter plants: be asked, find, see the list. */
import { html } from 'htm/preact';
import { t } from '../words.js';
import { site } from '../state.js';
import { Icon } from './icon.js';

/** @param {{current: string, root: string}} props */
export function PlantTabs({ current, root }) {
  const here = (name) => (name === current ? 'page' : undefined);
  return html`<nav class="tabs" aria-label=${t('plants.ways')}>
    <a href=${root} aria-current=${here('ask')}>${t('plants.ask')}</a>
    <a href=${`${root}/find`} aria-current=${here('find')}><${Icon} name="find"/>${t('plants.find')}</a>
    <a href=${`${root}/listed`} aria-current=${here('listed')}>${t('plants.listed', { n: site.value.findings.length })}</a></nav>`;
}

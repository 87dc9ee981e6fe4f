/** The foot: five tabs of a site check, or the four pages of the app. */
import { html } from 'htm/preact';
import { t } from '../words.js';
import { Icon } from './icon.js';

const SITE_TABS = ['place', 'plants', 'zone', 'production', 'reclaim'];
const PAGES = ['sites', 'book', 'hand', 'setup'];

/** @param {{current: string, siteId?: string}} props */
export function Foot({ current, siteId }) {
  const names = siteId ? SITE_TABS : PAGES;
  const href = (name) => (siteId ? `#/site/${siteId}/${name}` : `#/${name}`);
  return html`<nav class="foot" aria-label=${t(siteId ? 'foot.site' : 'foot.app')}>
    ${names.map((name) => html`<a key=${name} href=${href(name)} aria-current=${name === current ? 'page' : undefined}>
      <${Icon} name=${name}/><span>${t(`foot.${name}`)}</span></a>`)}</nav>`;
}

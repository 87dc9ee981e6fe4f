/** The page that the address asks for. Moves focus to its heading and says where one has come. */
import { html } from 'htm/preact';
import { useEffect, useErrorBoundary, useRef } from 'preact/hooks';
import { t } from './words.js';
import { region, route, site, spoken } from './state.js';
import { Patterns } from './parts/patterns.js';
import { Trouble } from './parts/trouble.js';
import { arrivals, Later } from './parts/later.js';
import { Sites } from './sites.js';

const here = (name) => (props) => html`<${name} ...${props}/>`;
const SITE_PAGES = {
  place: Later(() => import('./place.js'), 'Place'),
  plants: Later(() => import('./plants.js'), 'Plants'),
  zone: Later(() => import('./zone.js'), 'Zone'),
  production: Later(() => import('./production.js'), 'Production'),
  reclaim: Later(() => import('./reclaim.js'), 'Reclaim'),
};
const PAGES = {
  sites: here(Sites),
  book: Later(() => import('./book.js'), 'Book'),
  hand: Later(() => import('./hand.js'), 'Hand'),
  setup: Later(() => import('./setup.js'), 'Setup'),
};

/** @returns the whole page for the present address */
export function App() {
  const { page, parts } = route.value;
  const top = useRef(null);
  const address = [page, ...parts].join('/');
  useEffect(() => {
    const heading = top.current.querySelector('h1');
    if (!heading) return;
    document.title = t('app.title', { page: heading.textContent });
    heading.focus({ preventScroll: true });
  }, [address, arrivals.value]);
  return html`<div class="whole" ref=${top}>
    <${Patterns} zones=${region.value.zones}/>
    <${Guarded} address=${address}>${pageFor(page, parts)}</${Guarded}>
    <${Trouble}/>
    <p class="spoken" role="status" aria-live="polite">${spoken.value}</p></div>`;
}

/** A page that cannot be drawn says so and leaves the way back open; the next page is tried afresh. */
function Guarded({ address, children }) {
  const [fault, again] = useErrorBoundary((error) => reportError(error));
  const failedAt = useRef(null);
  if (fault && failedAt.current === null) failedAt.current = address;
  useEffect(() => {
    if (!fault || failedAt.current === address) return;
    failedAt.current = null;
    again();
  }, [address, fault]);
  if (!fault) return children;
  return html`<main class="refusal stack"><h1 tabindex="-1">${t('app.fault')}</h1><p>${t('app.fault_why')}</p><p class="small quiet">${String(fault.message)}</p>
    <p class="deep"><a class="btn go" href="#/sites">${t('foot.sites')}</a><a class="btn" href="#/hand">${t('foot.hand')}</a></p></main>`;
}

function pageFor(page, parts) {
  if (page === 'site') {
    if (!site.value || site.value.id !== parts[0]) return null;
    const Tab = SITE_PAGES[parts[1]] ?? SITE_PAGES.place;
    return html`<${Tab} parts=${parts.slice(2)}/>`;
  }
  const Page = PAGES[page] ?? PAGES.sites;
  return html`<${Page} parts=${parts}/>`;
}

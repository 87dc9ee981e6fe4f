/** What has to be said of the tables themselves: not tested on real plots; invented for trying out. */
import { html } from 'htm/preact';
import { t } from '../words.js';
import { region } from '../state.js';

/** True where only simulated sites have tested the tables, or nothing has. */
export const isUntested = () => region.value.pack.proof?.tested_on !== 'plots';

/** Beside every belief, where no real plot has tested the tables. */
export function Untested() {
  return isUntested() ? html`<p class="untested">${t('proof.untested')}</p>` : null;
}

/** Beside figures that somebody might order or decide by, where the region is invented. */
export function Invented() {
  return region.value.pack.region.invented ? html`<p class="stamp">${t('sites.invented')}</p>` : null;
}

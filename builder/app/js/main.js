/** Starts the app: words, store, tables, then the page that the address asks for. */
import { render } from 'preact';
import { html } from 'htm/preact';
import { checkProbes, prepare } from './core/index.js';
import { askForRoom, openStore, readFile, readRegions, readWords, tablesAtStart, watchVersions } from './store/index.js';
import { App } from './screens/app.js';
import { readAhead } from './screens/parts/later.js';
import { Refusal } from './screens/refusal.js';
import { closeSite, openById, readAll } from './screens/records.js';
import { makeRegion } from './screens/region.js';
import { unitsFrom } from './screens/settings.js';
import { home, parseRoute, region, route, saved, site, store, tables, trouble } from './screens/state.js';
import { found, start } from './screens/start.js';
import { setWords } from './screens/words.js';

const root = document.getElementById('app');

/** Speaks the person's language, else the phone's where there are words for it, else English. */
async function speak() {
  const languages = JSON.parse(await readFile('app/words/languages.json'));
  const wanted = start.value.language ?? navigator.language.slice(0, 2);
  const code = wanted in languages ? wanted : 'en';
  document.documentElement.lang = code;
  const [english, over] = await Promise.all([readWords('en'), code === 'en' ? null : readWords(code)]);
  setWords(english, code, over);
  found({ languages });
  return code;
}

/** Brings the region's tables in. @returns {Promise<string|null>} why not, as a key of words, or null */
async function bringTables(code, offers) {
  const offer = offers.find((one) => one.id === start.value.region) ?? offers[0];
  const edition = await tablesAtStart(store.value, offer, { readFile, checkProbes });
  const use = edition.tables ?? edition.unproved;
  found({ offers, edition, bookOnly: !edition.tables });
  if (!use) return 'no_tables';
  tables.value = use;
  home.value = makeRegion(use.pack, use.texts[code] ?? use.texts.en);
  region.value = home.value;
  unitsFrom(use.pack.region.units);
  return null;
}

async function follow() {
  const next = parseRoute(location.hash);
  if (next.page === 'site') await openById(next.parts[0]);
  else if (site.value) closeSite();
  route.value = next;
}

async function run() {
  // The disk opens while the words are read; what fails there is told below, in those words.
  const early = Promise.all([openStore(), readRegions()]);
  early.catch(() => {});
  const code = await speak();
  try {
    const [opened, offers] = await early;
    store.value = opened;
    const why = await bringTables(code, offers);
    if (why) throw Object.assign(new Error(why), { code: why });
    await readAll();
    await follow();
  } catch (fault) {
    render(html`<${Refusal} fault=${fault}/>`, root);
    return;
  }
  root.replaceChildren();
  render(html`<${App}/>`, root);
  setTimeout(() => prepare(tables.value.pack));
  readAhead();
  addEventListener('hashchange', () => { follow().catch((fault) => { trouble.value = { code: fault.code ?? 'lost' }; }); });
  // The phone may end the page at any time once it is out of sight.
  addEventListener('visibilitychange', () => { if (document.visibilityState === 'hidden') saved().catch(() => {}); });
  found({ room: await askForRoom(store.value) });
  found({ versions: await watchVersions({
    onWaiting: () => found({ waiting: true }),
    onReplaced: () => { if (!site.value) location.reload(); },
    onOffline: () => found({ offline: true }),
  }) });
}

run();

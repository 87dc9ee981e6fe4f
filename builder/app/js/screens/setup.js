/** Setup: paper, hand, units, language, tables, observer, storage, version. */
import { html } from 'htm/preact';
import { useTables } from '../store/index.js';
import { has, t } from './words.js';
import { region, store } from './state.js';
import { hand, mode, observer, units } from './settings.js';
import { beginWith, start } from './start.js';
import { Bar } from './parts/bar.js';
import { Choice, Field } from './parts/choice.js';
import { EdgeShut } from './parts/edge_shut.js';
import { Foot } from './parts/foot.js';
import { language, words } from './words.js';

const named = (group, values) => values.map((value) => ({ value, label: t(`${group}.${value}`) }));

/** @returns the Setup page */
export function Setup() {
  const { languages, offers, room, waiting, versions } = start.value;
  return html`<div class="page p-setup"><${Bar} title=${t('setup.title')} line=${t('setup.line')}/><${EdgeShut} belts=${region.value.belts}/>
    <main><section class="part lead0">
      <${Choice} label=${t('setup.paper')} options=${named('mode', ['day', 'night', 'sun'])} value=${mode.value} onPick=${(value) => { mode.value = value; }} row/>
      <${Choice} label=${t('setup.hand')} options=${named('setup', ['left', 'right'])} value=${hand.value} onPick=${(value) => { hand.value = value; }} row/>
      <${Choice} label=${t('setup.units')} options=${named('setup', ['metric', 'us'])} value=${units.value} onPick=${(value) => { units.value = value; }}/>
      ${Object.keys(languages).length > 1 && html`<${Choice} label=${t('setup.language')} options=${Object.entries(languages).map(([value, label]) => ({ value, label }))} value=${language.value} onPick=${(value) => { beginWith({ language: value }); location.reload(); }}/>`}
      ${!words.value.reviewed_by && html`<p class="small quiet">${t('setup.unreviewed')}</p>`}</section>
    <section class="part"><${Field} label=${t('setup.observer')} hint=${t('setup.observer_why')} value=${observer.value} onChange=${(name) => { observer.value = name; }}/></section>
    <section class="part stack"><h2>${t('setup.region')}</h2><p>${t('setup.region_line', { name: region.value.name, edition: region.value.edition, date: region.value.pack.region.date })}</p>
      ${offers.length > 1 && html`<${Choice} label=${t('setup.reload')} options=${offers.map((one) => ({ value: one.id, label: one.name }))} value=${region.value.id} onPick=${(value) => { beginWith({ region: value }); location.reload(); }}/>`}
      <${Edition}/></section>
    <section class="part stack"><h2>${t('setup.storage')}</h2>${room && html`<p>${t(room.persisted ? 'setup.persisted' : 'setup.not_persisted')} ${room.nearly_full ? t('setup.nearly_full') : ''}</p>`}</section>
    <section class="part stack"><h2>${t('setup.app')}</h2><p>${t(waiting ? 'setup.waiting' : 'setup.checked')}</p>
      ${waiting && html`<p class="deep"><button type="button" class="btn go" onClick=${() => versions?.use()}>${t('setup.use_version')}</button></p>`}</section></main>
    <${Foot} current="setup"/></div>`;
}

/** A new edition waits for the person; one that was not taken says why. */
function Edition() {
  const { edition } = start.value;
  const use = async () => {
    await useTables(store.value, edition.offered);
    location.reload();
  };
  if (edition?.state === 'offered') return html`<p><b>${t('setup.new_edition')}</b> ${t('setup.new_why', { edition: edition.offered.edition, date: edition.offered.date })}</p><p class="deep"><button type="button" class="btn go" onClick=${use}>${t('setup.use')}</button></p>`;
  if (edition?.state === 'kept') return html`<p class="care">${t('setup.kept')} ${has(`store.${edition.fault.code}`) ? t(`store.${edition.fault.code}`) : ''}</p>`;
  return null;
}

/** Hand over: records out to one file, records in from one, and what two phones both changed. */
import { html } from 'htm/preact';
import { useEffect, useState } from 'preact/hooks';
import { exportRecords, readRecords, takeIn } from '../store/exchange.js';
import { listSides, settleSide } from '../store/index.js';
import { t } from './words.js';
import { region, say, sites, store, trouble, units } from './state.js';
import { readAll } from './records.js';
import { Bar } from './parts/bar.js';
import { Choice } from './parts/choice.js';
import { EdgeShut } from './parts/edge_shut.js';
import { Foot } from './parts/foot.js';
import { Icon } from './parts/icon.js';

/** @returns the Hand over page */
export function Hand() {
  const [told, tell] = useState(null);
  const line = t('hand.line', { n: sites.value.length });
  return html`<div class="page p-hand"><${Bar} title=${t('hand.title')} line=${line}/><${EdgeShut} belts=${region.value.belts}/>
    <main><${Out} onDone=${() => tell(null)}/><${In} told=${told} tell=${tell}/><${Sides} told=${told}/></main><${Foot} current="hand"/></div>`;
}

function Out() {
  const [unit, setUnit] = useState('');
  const [photos, setPhotos] = useState(true);
  const [names, setNames] = useState(false);
  const rows = sites.value.filter((row) => unit === '' || row.unit_id === unit);
  const make = async () => new File([await exportRecords(store.value, rows.map((row) => row.id), { photos, names })], t('hand.file', { date: new Date().toISOString().slice(0, 10) }), { type: 'application/json' });
  const share = async () => {
    const file = await make();
    // A person who closes the share sheet has decided; that is no fault.
    await navigator.share({ files: [file], title: file.name }).catch(() => {});
  };
  const save = async () => {
    const file = await make();
    const link = Object.assign(document.createElement('a'), { href: URL.createObjectURL(file), download: file.name });
    link.click();
    setTimeout(() => URL.revokeObjectURL(link.href), 60_000);
    say(t('hand.done'));
  };
  const may = navigator.canShare?.({ files: [new File([''], 'a.json', { type: 'application/json' })] });
  if (sites.value.length === 0) return html`<section class="part lead0"><p>${t('hand.nothing')}</p></section>`;
  return html`<section class="part lead0 stack"><p>${t('hand.only_here')}</p>
    <${Choice} label=${t('hand.which')} options=${[{ value: '', label: t('hand.all') }, ...units.value.map((one) => ({ value: one.id, label: one.name }))]} value=${unit} onPick=${setUnit}/>
    <${Switch} label=${t('hand.photos')} on=${photos} onTurn=${setPhotos}/><${Switch} label=${t('hand.names')} on=${names} onTurn=${setNames}/>
    <div class="deep">${may && html`<button type="button" class="btn go" onClick=${share}><${Icon} name="hand"/>${t('hand.share')}</button>`}<button type="button" class=${`btn ${may ? '' : 'go'}`} onClick=${save}>${t('hand.save')}</button></div></section>`;
}

/** A two-way switch. @param {{label: string, on: boolean, onTurn: (on: boolean) => void}} props */
export function Switch({ label, on, onTurn }) {
  return html`<button type="button" class="switch" role="switch" aria-checked=${String(on)} onClick=${() => onTurn(!on)}><i></i><span>${label}</span></button>`;
}

function In({ told, tell }) {
  const take = async (event) => {
    const [file] = event.currentTarget.files;
    if (!file) return;
    try {
      const found = readRecords(await file.text());
      const merged = await takeIn(store.value, found);
      await readAll();
      tell({ added: merged.added.length, replaced: merged.replaced.length, same: merged.same.length + merged.kept.length, conflicts: merged.conflicts.length, refused: found.refused.length });
    } catch (fault) {
      trouble.value = { code: fault.code };
    }
  };
  return html`<section class="part stack"><h2>${t('hand.title_in')}</h2><p>${t('hand.in_why')}</p>
    <label class="btn">${t('hand.in')}<input class="spoken" type="file" accept=".json,application/json" onChange=${take}/></label>
    <div role="status">${told && html`<ul class="plain-list">${Object.entries(told).filter(([, n]) => n > 0).map(([name, n]) => html`<li key=${name}>${t(`hand.${name}`, { n })}</li>`)}</ul>`}</div></section>`;
}

function Sides({ told }) {
  const [sides, setSides] = useState([]);
  const read = () => listSides(store.value).then(setSides);
  useEffect(() => { read(); }, [told]);
  const settle = async (side, keep) => {
    await settleSide(store.value, side.key, keep);
    await readAll();
    read();
  };
  if (sides.length === 0) return null;
  return html`<section class="part"><h2>${t('hand.sides')}</h2><ul class="plain-list">${sides.map((side) => html`<li key=${side.key}><p>${sideWords(side)}</p>
    <div class="deep"><button type="button" class="btn" onClick=${() => settle(side, 'mine')}>${t('hand.keep_mine')}</button><button type="button" class="btn" onClick=${() => settle(side, 'theirs')}>${t('hand.keep_theirs')}</button></div></li>`)}</ul></section>`;
}

function sideWords({ site_id: id, site: theirs }) {
  const mine = sites.value.find((row) => row.id === id) ?? theirs;
  const at = (record) => record.changed_at.slice(0, 16).replace('T', ' ');
  return t('hand.side', { name: theirs.name || mine.name, mine: mine.findings.length, mine_at: at(mine), theirs: theirs.findings.length, theirs_at: at(theirs) });
}

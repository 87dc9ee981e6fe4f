/** The plot header: name, unit, role, observer, date, notes. */
import { html } from 'htm/preact';
import { t } from './words.js';
import { change, units } from './state.js';
import { observer } from './settings.js';
import { dropSite, startSpot, unitNamed } from './records.js';
import { Choice, Field, Typed } from './parts/choice.js';
import { Confirm } from './parts/confirm.js';

const ROLES = ['inside', 'edge', 'reference', 'duplicate'];

/** @param {{record: object}} props */
export function Header({ record }) {
  const inUnit = async (name) => {
    const unit = name.trim() ? await unitNamed(name.trim()) : null;
    change({ unit_id: unit?.id ?? null, unit_name: unit?.name ?? '' });
  };
  const by = (name) => {
    observer.value = name;
    change({ observer: name });
  };
  const dated = (date) => { if (date) change({ date, month: Number(date.slice(5, 7)) }); };
  return html`<section class="part stack"><h2>${t('place.header')}</h2>
    <${Field} label=${t('place.name')} value=${record.name} onChange=${(name) => change({ name })}/>
    <${Field} label=${t('place.unit')} value=${record.unit_name} hint=${t('place.unit_why')} onChange=${inUnit} late list="units"/>
    <datalist id="units">${units.value.map((unit) => html`<option value=${unit.name}/>`)}</datalist>
    <${Choice} label=${t('place.role')} options=${ROLES.map((role) => ({ value: role, label: t(`role.${role}`) }))} value=${record.role} onPick=${(role) => change({ role }, t('undo.role'))}/>
    <p class="small quiet">${t(`role.why_${record.role}`)}</p>
    <${Field} label=${t('place.observer')} value=${record.observer} onChange=${by}/>
    <${Field} label=${t('place.date')} type="date" value=${record.date} onChange=${dated}/>
    <label class="field"><span>${t('place.notes')}</span><${Typed} rows=${3} value=${record.notes} onChange=${(notes) => change({ notes })}/></label>
    <p class="deep"><button type="button" class="btn" onClick=${() => startSpot(t('place.duplicate_name', { name: record.name }), { role: 'duplicate' })}>${t('place.duplicate')}</button></p>
    <${Confirm} ask=${t('place.remove')} sure=${t('place.remove_sure')} yes=${t('place.remove_yes')} onYes=${() => dropSite(record.id)}/></section>`;
}

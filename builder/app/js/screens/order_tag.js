/** A seed lot's tag as it is read off the bag. */
import { html } from 'htm/preact';
import { useState } from 'preact/hooks';
import { t } from './words.js';
import { Field } from './parts/choice.js';
import { readNumber } from './parts/wheel.js';

const SHARES = ['purity', 'germination', 'dormant', 'tetrazolium', 'other_crop', 'weed_seed'];

/** @param {{lot: object, plant: object, strict: boolean, onKeep: (tag: object) => void, onShut: () => void}} props
 *  strict: the mix asks for the subspecies by name */
export function Tag({ lot, plant, strict, onKeep, onShut }) {
  const [tag, setTag] = useState(tagOf(lot));
  const put = (patch) => setTag({ ...tag, ...patch });
  const share = (name) => html`<${Field} key=${name} label=${t(`tag.${name}`)} mode="decimal" unit="%" value=${tag[name] == null ? '' : Math.round(tag[name] * 1000) / 10}
    limits=${[0, 100]} onChange=${(text) => { const pct = readNumber(text, 0, 100); put({ [name]: pct === null ? null : pct / 100 }); }}/>`;
  return html`<div class="tagform stack"><${Field} label=${t('tag.lot')} value=${tag.lot ?? ''} onChange=${(text) => put({ lot: text })}/>
    <${Field} label=${t('tag.kind')} value=${tag.kind ?? ''} hint=${t('tag.kind_why', { name: plant.scientific })} onChange=${(kind) => put({ kind, generic: strict && isGeneric(kind, plant.scientific) })}/>
    <${Field} label=${t('tag.origin')} value=${tag.origin ?? ''} onChange=${(origin) => put({ origin })}/>
    <${Field} label=${t('tag.test_date')} type="date" value=${tag.test_date ?? ''} onChange=${(test_date) => put({ test_date: test_date || null })}/>
    <div class="pair">${SHARES.map(share)}</div>
    <${Field} label=${t('tag.noxious')} value=${(tag.noxious ?? []).join(', ')} onChange=${(text) => put({ noxious: text.split(',').map((one) => one.trim()).filter(Boolean) })}/>
    <div class="deep"><button type="button" class="btn go" onClick=${() => onKeep(tag)}>${t('tag.keep')}</button><button type="button" class="btn" onClick=${onShut}>${t('confirm.no')}</button></div></div>`;
}

const FIELDS = ['lot', 'kind', 'generic', 'origin', 'test_date', 'noxious', ...SHARES];
const tagOf = (lot) => Object.fromEntries(FIELDS.filter((name) => lot[name] !== undefined).map((name) => [name, lot[name]]));

/** A kind that stops at the species where the mix asks for a subspecies or variety. */
export function isGeneric(kind, wanted) {
  const below = / (ssp|subsp|var)\. (\S+)/.exec(wanted);
  return Boolean(kind.trim() && below && !kind.toLowerCase().includes(below[2].toLowerCase()));
}

/** Height and position: by the phone's receiver, or typed; and the belts that height alone allows. */
import { html } from 'htm/preact';
import { useState } from 'preact/hooks';
import { t } from './words.js';
import { change, say } from './state.js';
import { heightFrom, heightShown, heightUnit, heightWords } from './say.js';
import { Icon } from './parts/icon.js';
import { Field } from './parts/choice.js';
import { readNumber } from './parts/wheel.js';
import { allowed, shiftHere } from './height_mark.js';
import { PlannedPoints } from './place_points.js';

const WAIT_MS = 30_000;

/** @param {{region: object, record: object}} props */
export function Height({ region, record }) {
  const [state, tell] = useState('idle');
  const { place } = record;
  const locate = () => {
    tell('asking');
    askReceiver().then((found) => { keep(place, found); tell('found'); say(t('place.found')); }, (code) => { tell(code); say(t(`place.${code}`)); });
  };
  return html`<section class="part"><p class="label">${t('place.height')}</p>
    <p class="read"><span class=${`big ${place.height_m === null ? 'unset' : ''}`}>${place.height_m === null ? t('place.no_height') : heightWords(place.height_m)}</span>
      ${place.accuracy_m !== null && html`<span class="quiet">${t('place.within', { distance: heightWords(place.accuracy_m) })}</span>`}</p>
    <p class="small">${heightLine(region, record)}</p>
    <div class="pair"><button type="button" class="btn" onClick=${locate} disabled=${state === 'asking'}><${Icon} name="pin"/>${t(state === 'asking' ? 'place.asking' : 'place.here')}</button>
      <${Field} label=${t('place.height_typed')} mode="decimal" unit=${heightUnit()} value=${place.height_m === null ? '' : heightShown(place.height_m)}
        limits=${[-1500, 30000]} onChange=${(text) => change({ place: { ...place, height_m: heightFrom(readNumber(text, -1500, 30000)) } })}/></div>
    ${['refused', 'no_signal', 'none'].includes(state) && html`<p class="hint care"><${Icon} name="warn"/><span>${t(`place.${state}`)}</span></p>`}
    ${place.latitude_deg !== null && html`<p class="small quiet">${t('place.position', { latitude: place.latitude_deg.toFixed(5), longitude: place.longitude_deg.toFixed(5) })}</p>`}
    <${PlannedPoints} record=${record}/>
  </section>`;
}

function heightLine(region, record) {
  if (record.place.height_m === null) return t('place.height_why');
  const belts = allowed(region, record);
  const alone = belts.length === 0 ? t('place.alone_none')
    : belts.length === 1 ? t('place.alone_one', { zone: belts[0].letter })
      : t('place.alone', { low: belts[0].letter, high: belts.at(-1).letter });
  const shift = shiftHere(region, record);
  const moved = shift === 0 ? '' : `${t(shift > 0 ? 'place.higher' : 'place.lower', { distance: heightWords(Math.abs(shift)) })} `;
  return `${moved}${alone} ${t('place.decide')}`;
}

function keep(place, found) {
  const { latitude, longitude, accuracy, altitude } = found.coords;
  const height = altitude === null ? place.height_m : Math.round(altitude);
  change({ place: { ...place, latitude_deg: latitude, longitude_deg: longitude, accuracy_m: Math.round(accuracy), height_m: height } }, t('undo.position'));
}

/** The receiver's position; rejects with a word: refused, no_signal, none. */
function askReceiver() {
  return new Promise((resolve, reject) => {
    if (!navigator.geolocation) {
      reject('none');
      return;
    }
    navigator.geolocation.getCurrentPosition(resolve, (error) => reject(error.code === error.PERMISSION_DENIED ? 'refused' : 'no_signal'),
      { enableHighAccuracy: true, timeout: WAIT_MS, maximumAge: 0 });
  });
}

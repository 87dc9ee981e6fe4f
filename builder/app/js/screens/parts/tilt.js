/** Slope by the phone itself: laid on a board or map case on the slope, its tilt is read off. */
import { html } from 'htm/preact';
import { useEffect, useState } from 'preact/hooks';
import { slopePct } from '../../core/terrain.js';
import { t } from '../words.js';
import { Icon } from './icon.js';

const STEEPEST_DEG = 80;

/** Tilt of a lying phone from level, whichever way it is turned. [deg] @param {{beta: number, gamma: number}} turned */
export function tiltDeg({ beta, gamma }) {
  const radians = Math.PI / 180;
  return Math.acos(Math.abs(Math.cos(beta * radians) * Math.cos(gamma * radians))) / radians;
}

/** @param {{onSlope: (slope_pct: number) => void}} props */
export function Tilt({ onSlope }) {
  const [state, setState] = useState('idle');
  const [pct, setPct] = useState(null);
  useEffect(() => {
    if (state !== 'reading') return undefined;
    const read = (event) => {
      if (event.beta === null || event.gamma === null) return;
      const tilt = tiltDeg(event);
      setPct(tilt > STEEPEST_DEG ? null : Math.round(slopePct({ slope_deg: tilt })));
    };
    addEventListener('deviceorientation', read);
    return () => removeEventListener('deviceorientation', read);
  }, [state]);
  if (typeof DeviceOrientationEvent === 'undefined' || !navigator.maxTouchPoints) return null;
  const start = async () => {
    // One maker of phones asks the person first; the others just tell.
    const asks = DeviceOrientationEvent.requestPermission;
    const may = asks ? await asks.call(DeviceOrientationEvent).catch(() => 'denied') : 'granted';
    setPct(null);
    setState(may === 'granted' ? 'reading' : 'refused');
  };
  if (state !== 'reading') return html`<div class="tilt"><button type="button" class="btn plain" onClick=${start}><${Icon} name="pit"/>${t('tilt.start')}</button>${state === 'refused' && html`<p class="small care">${t('tilt.refused')}</p>`}</div>`;
  return html`<div class="tilt"><p class="small">${t('tilt.how')}</p><p class="read"><span class="big">${pct === null ? '–' : t('unit.pct', { n: pct })}</span></p>
    <div class="deep">${pct !== null && html`<button type="button" class="btn go" onClick=${() => { onSlope(pct); setState('idle'); }}>${t('tilt.take', { n: pct })}</button>`}
      <button type="button" class="btn" onClick=${() => setState('idle')}>${t('confirm.no')}</button></div></div>`;
}

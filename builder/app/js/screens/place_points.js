/** Planned points on Place: brought in from a file, picked by name, not by taste. */
import { html } from 'htm/preact';
import { useEffect, useState } from 'preact/hooks';
import { getSetting, setSetting } from '../store/index.js';
import { t } from './words.js';
import { change, sites, store, trouble } from './state.js';
import { Icon } from './parts/icon.js';
import { readPoints } from './points.js';
import { drawPoints, readShapes } from './random_points.js';

const POINTS = 'points';
const SHOWN = 12;
const DRAWN = 10;

/** @param {{record: object}} props */
export function PlannedPoints({ record }) {
  const [points, setPoints] = useState([]);
  const [all, showAll] = useState(false);
  const [told, tell] = useState(null);
  useEffect(() => { getSetting(store.value, POINTS).then((kept) => setPoints(kept ?? []), () => setPoints([])); }, []);
  const bring = async (event) => {
    const [file] = event.currentTarget.files;
    if (!file) return;
    const { read, said } = taken(await file.text());
    tell(said);
    if (read.length === 0) return;
    setPoints(read);
    await setSetting(store.value, POINTS, read).catch((fault) => { trouble.value = { code: fault.code }; });
  };
  const pick = (point) => change({
    name: point.name,
    place: { ...record.place, latitude_deg: point.latitude_deg, longitude_deg: point.longitude_deg, accuracy_m: null, height_m: point.height_m ?? record.place.height_m },
  }, t('undo.position'));
  const used = new Set(sites.value.map((row) => row.name));
  const shown = all ? points : points.slice(0, SHOWN);
  return html`<details class="planned"><summary><${Icon} name="place"/>${t('points_in.title')}</summary>
    <p class="small quiet">${t('points_in.why')}</p>
    ${points.length > 0 && html`<div class="chips" role="group" aria-label=${t('points_in.title')}>${shown.map((point) => html`<button key=${point.name} type="button" class="chip" aria-pressed=${String(record.name === point.name)} onClick=${() => pick(point)}>${point.name}${used.has(point.name) && record.name !== point.name ? html` <${Icon} name="check"/><span class="spoken">${t('points_in.done')}</span>` : ''}</button>`)}
      ${!all && points.length > SHOWN && html`<button type="button" class="chip" onClick=${() => showAll(true)}>${t('find.more', { n: points.length - SHOWN })}</button>`}</div>`}
    <p class="deep"><label class="btn">${t('points_in.bring')}<input class="spoken" type="file" accept=".gpx,.geojson,.json,application/gpx+xml,application/geo+json" onChange=${bring}/></label></p>
    <p class="small" role="status">${told}</p></details>`;
}

/** The file's own points; where it holds an outline or a line instead, points drawn in it by lot. */
function taken(text) {
  const read = readPoints(text);
  if (read.length) return { read, said: t('points_in.brought', { n: read.length }) };
  const [shape] = readShapes(text);
  if (!shape) return { read, said: t('points_in.none') };
  const seed = 1 + (crypto.getRandomValues(new Uint32Array(1))[0] % 9999);
  const drawn = drawPoints(shape, DRAWN, seed);
  return { read: drawn, said: t('points_in.drawn', { n: drawn.length, seed: String(seed) }) };
}

/** Photos of a site check: taken or chosen, made smaller on the phone, captioned, removed. */
import { html } from 'htm/preact';
import { useEffect, useState } from 'preact/hooks';
import { addPhoto, captionPhoto, photosOf, photoUrl, removePhoto } from '../store/index.js';
import { t } from './words.js';
import { change, saved, site, store, trouble } from './state.js';
import { Icon } from './parts/icon.js';
import { Field } from './parts/choice.js';
import { Confirm } from './parts/confirm.js';

const LONGEST_PX = 1600;
const QUALITY = 0.82;

/** @param {{record: object}} props */
export function Photos({ record }) {
  const [rows, setRows] = useState([]);
  const read = () => photosOf(store.value, record.id).then(setRows, () => setRows([]));
  useEffect(() => { read(); }, [record.id]);
  const take = async (event) => {
    const files = [...event.currentTarget.files];
    event.currentTarget.value = '';
    try {
      // The phone may shut this page while its camera is open: what was entered is stored first.
      await saved();
      for (const file of files) {
        const id = await addPhoto(store.value, record.id, await smaller(file));
        change({ photos: [...site.value.photos, id] });
      }
    } catch (fault) {
      trouble.value = { code: fault.code ?? 'picture' };
    }
    read();
  };
  const drop = async (id) => {
    await removePhoto(store.value, id);
    change({ photos: site.value.photos.filter((one) => one !== id) });
    read();
  };
  return html`<section class="part stack"><h2>${t('photo.title')}</h2>
    <label class="btn"><${Icon} name="photo"/>${t('photo.take')}<input class="spoken" type="file" accept="image/*" capture="environment" multiple onChange=${take}/></label>
    <ul class="photos">${rows.map((row, i) => html`<li key=${row.id}><${Shown} row=${row} n=${i + 1}/>
      <${Field} label=${t('photo.caption')} value=${row.caption} onChange=${(caption) => captionPhoto(store.value, row.id, caption)}/>
      <${Confirm} ask=${t('photo.remove')} sure=${t('photo.sure')} yes=${t('photo.yes')} onYes=${() => drop(row.id)}/></li>`)}</ul></section>`;
}

function Shown({ row, n }) {
  const [url, setUrl] = useState(null);
  useEffect(() => {
    const made = photoUrl(row);
    setUrl(made);
    return () => URL.revokeObjectURL(made);
  }, [row.id]);
  return url && html`<img src=${url} alt=${row.caption || t('photo.alt', { n })}/>`;
}

/** The picture redrawn no longer than the limit: small, and without the phone's own notes in it. */
async function smaller(file) {
  const picture = await createImageBitmap(file);
  const scale = Math.min(1, LONGEST_PX / Math.max(picture.width, picture.height));
  const canvas = document.createElement('canvas');
  canvas.width = Math.round(picture.width * scale);
  canvas.height = Math.round(picture.height * scale);
  canvas.getContext('2d').drawImage(picture, 0, 0, canvas.width, canvas.height);
  const blob = await new Promise((resolve) => { canvas.toBlob(resolve, 'image/jpeg', QUALITY); });
  return { bytes: await blob.arrayBuffer(), type: blob.type, width_px: canvas.width, height_px: canvas.height };
}

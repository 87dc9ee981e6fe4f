/** Photos of a site check, kept as ArrayBuffer: WebKit aborted storing a Blob. */
import { newId } from './ids.js';
import { BY_SITE, PHOTOS } from './names.js';
import { stamp } from './time.js';
import { inStore } from './tx.js';

/**
 * @param {import('./schema.js').Store} store
 * @param {string} siteId
 * @param {{bytes: ArrayBuffer, type: string, width_px?: number, height_px?: number, caption?: string}} photo
 * @returns {Promise<string>} its id, once it is on the disk
 */
export async function addPhoto(store, siteId, photo) {
  const row = { id: newId(), site_id: siteId, taken_at: stamp(), caption: '', ...photo };
  await inStore(store.records, [PHOTOS], 'readwrite', (photos) => photos.put(row));
  return row.id;
}

/** The photos of one site check, in the order taken. */
export async function photosOf(store, siteId) {
  const rows = await inStore(store.records, [PHOTOS], 'readonly', (photos) => photos.index(BY_SITE).getAll(siteId));
  return rows.sort((a, b) => (a.taken_at < b.taken_at ? -1 : a.taken_at > b.taken_at ? 1 : 0));
}

/** Changes the caption of a photo that is still there. */
export function captionPhoto(store, id, caption) {
  return inStore(store.records, [PHOTOS], 'readwrite', (photos) => {
    const read = photos.get(id);
    read.onsuccess = () => { if (read.result) photos.put({ ...read.result, caption }); };
    return read;
  });
}

export function removePhoto(store, id) {
  return inStore(store.records, [PHOTOS], 'readwrite', (photos) => photos.delete(id));
}

/** A stored photo as an object URL to show; the caller revokes it. */
export function photoUrl(photo) {
  return URL.createObjectURL(new Blob([photo.bytes], { type: photo.type }));
}

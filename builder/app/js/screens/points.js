/** Planned points out of a GPX or GeoJSON file. Pure reading; the page's policy lets no parser of
 *  markup run, so the few tags of GPX that matter are picked out as text. */

const MOST = 2000;
const LONGEST_NAME = 80;

/** @typedef {{name: string, latitude_deg: number, longitude_deg: number, height_m: number|null}} Point */

/** Points of a file, none where it holds none. @param {string} text  @returns {Point[]} */
export function readPoints(text) {
  const points = text.trimStart().startsWith('<') ? fromGpx(text) : fromGeoJson(text);
  return points.filter(isOnEarth).slice(0, MOST).map((one, i) => ({ ...one, name: one.name.slice(0, LONGEST_NAME) || String(i + 1) }));
}

const isOnEarth = ({ latitude_deg: latitude, longitude_deg: longitude }) => Math.abs(latitude) <= 90 && Math.abs(longitude) <= 180;
const ENTITIES = { '&amp;': '&', '&lt;': '<', '&gt;': '>', '&quot;': '"', '&apos;': "'" };
const plain = (text) => text.replace(/<!\[CDATA\[([\s\S]*?)\]\]>/g, '$1').replace(/&(amp|lt|gt|quot|apos);/g, (one) => ENTITIES[one]).trim();

/** Waypoints of GPX 1.1. */
function fromGpx(text) {
  return [...text.matchAll(/<wpt\b([^>]*?)(?:\/>|>([\s\S]*?)<\/wpt>)/g)].map(([, head, body = '']) => ({
    name: plain(/<name>([\s\S]*?)<\/name>/.exec(body)?.[1] ?? ''),
    latitude_deg: Number(/\blat\s*=\s*["']([^"']+)/.exec(head)?.[1] ?? NaN),
    longitude_deg: Number(/\blon\s*=\s*["']([^"']+)/.exec(head)?.[1] ?? NaN),
    height_m: whole(/<ele>([\s\S]*?)<\/ele>/.exec(body)?.[1]),
  }));
}

/** Point features of GeoJSON (RFC 7946: longitude first, height third). */
function fromGeoJson(text) {
  let file = null;
  try {
    file = JSON.parse(text);
  } catch {
    return [];
  }
  const features = Array.isArray(file?.features) ? file.features : [];
  return features.filter((one) => one?.geometry?.type === 'Point' && Array.isArray(one.geometry.coordinates)).map((one) => {
    const [longitude_deg, latitude_deg, height] = one.geometry.coordinates.map(Number);
    return { name: String(one.properties?.name ?? ''), latitude_deg, longitude_deg, height_m: whole(height) };
  });
}

function whole(height) {
  const metres = height === undefined || height === '' ? NaN : Number(height);
  return Number.isFinite(metres) ? Math.round(metres) : null;
}

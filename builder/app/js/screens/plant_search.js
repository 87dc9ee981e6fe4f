/** Search over every name a plant goes by: common, scientific, local, code, synonym.
 *  One typing error in a word is forgiven. */
import uFuzzy from '@leeoniya/ufuzzy';

const match = new uFuzzy({ intraMode: 1, intraIns: 1, intraSub: 1, intraTrn: 1, intraDel: 1 });
const ready = new WeakMap();

const plain = (text) => text.normalize('NFD').replace(/[\u0300-\u036f]/g, '').toLowerCase();

/** One line for each name, so that a hit knows which name was meant. */
function linesOf(region) {
  if (!ready.has(region)) {
    const lines = region.plants.flatMap((plant, at) => namesOf(plant).map((name) => ({ at, name, text: plain(name) })));
    ready.set(region, { lines, texts: lines.map((line) => line.text) });
  }
  return ready.get(region);
}

const namesOf = (plant) => [plant.common, plant.scientific, ...(plant.local ?? []), ...(plant.codes ?? []), ...(plant.synonyms ?? [])].filter(Boolean);

/** Plants whose names hold the text, best first, with the name that was hit.
 *  @param {object} region  @param {string} text  @returns {{plant: object, by: string}[]} */
export function findPlants(region, text) {
  const wanted = plain(text.trim());
  if (!wanted) return [];
  const { lines, texts } = linesOf(region);
  const [found, , order] = match.search(texts, wanted, 1);
  const ranked = order ? order.map((i) => found[i]) : found ?? [];
  const hits = new Map();
  for (const i of ranked) {
    const { at, name } = lines[i];
    if (!hits.has(at)) hits.set(at, { plant: region.plants[at], by: name });
  }
  const starts = (hit) => namesOf(hit.plant).some((name) => plain(name).split(/[\s-]/).some((word) => word.startsWith(wanted)));
  return [...hits.values()].sort((a, b) => starts(b) - starts(a));
}

/** Groups to answer with ("some sagebrush"): those of that name, then those that two of the found
 *  plants or more belong to, most of them first. */
export function groupsAmong(region, hits, text = '') {
  const wanted = plain(text.trim());
  const named = wanted.length > 2 ? region.groups.filter((group) => group.use === 'answer' && plain(group.name).includes(wanted)) : [];
  const counts = new Map();
  for (const { plant } of hits) for (const at of plant.groups) counts.set(at, (counts.get(at) ?? 0) + 1);
  const shared = [...counts].filter(([at, n]) => n > 1 && region.groups[at].use === 'answer').sort((a, b) => b[1] - a[1]).map(([at]) => region.groups[at]);
  return [...new Set([...named, ...shared])];
}

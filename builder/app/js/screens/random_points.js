/** Points drawn by lot inside an outline or along a line, the same for the same seed. Pure. */

const METRES_PER_DEGREE = 111_320;
const MOST_TRIES = 20_000;

/** Repeatable numbers in 0..1 (Weyl sequence with a mixing step, 32 bits). @param {number} seed */
export function lot(seed) {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x9e3779b9) >>> 0;
    let mixed = Math.imul(state ^ (state >>> 16), 0x21f0aaad);
    mixed = Math.imul(mixed ^ (mixed >>> 15), 0x735a2d97);
    return ((mixed ^ (mixed >>> 15)) >>> 0) / 4294967296;
  };
}

/** Shapes of a GeoJSON file to draw in. @param {string} text  @returns {{kind: 'area'|'line', rings: number[][][]}[]} */
export function readShapes(text) {
  let file = null;
  try {
    file = JSON.parse(text);
  } catch {
    return [];
  }
  const geometries = (Array.isArray(file?.features) ? file.features.map((one) => one?.geometry) : [file?.geometry ?? file]).filter(Boolean);
  return geometries.flatMap(({ type, coordinates }) => {
    if (type === 'Polygon') return [{ kind: 'area', rings: coordinates }];
    if (type === 'MultiPolygon') return coordinates.map((rings) => ({ kind: 'area', rings }));
    if (type === 'LineString') return [{ kind: 'line', rings: [coordinates] }];
    return [];
  });
}

/** Points drawn evenly over the ground of the first shape. @param {object} shape  @param {number} count  @param {number} seed */
export function drawPoints(shape, count, seed) {
  const roll = lot(seed);
  const at = shape.kind === 'area' ? inArea(shape.rings, roll) : alongLine(shape.rings[0], roll);
  const points = [];
  for (let i = 0; i < count; i += 1) {
    const place = at();
    if (!place) break;
    points.push({ name: `${seed}-${i + 1}`, latitude_deg: place[1], longitude_deg: place[0], height_m: null });
  }
  return points;
}

/** Even over the ground: a degree of longitude counts less nearer the pole. */
function inArea(rings, roll) {
  const [west, east] = span(rings[0], 0);
  const [south, north] = span(rings[0], 1).map((latitude) => Math.sin((latitude * Math.PI) / 180));
  return () => {
    for (let i = 0; i < MOST_TRIES; i += 1) {
      const place = [west + roll() * (east - west), (Math.asin(south + roll() * (north - south)) * 180) / Math.PI];
      // Inside the outline and outside its holes: an odd number of edges lies to the east.
      if (rings.reduce((crossed, ring) => crossed !== inside(ring, place), false)) return place;
    }
    return null;
  };
}

const span = (ring, axis) => [Math.min(...ring.map((one) => one[axis])), Math.max(...ring.map((one) => one[axis]))];

function inside(ring, [x, y]) {
  let odd = false;
  ring.forEach(([bx, by], i) => {
    const [ax, ay] = ring.at(i - 1);
    if (ay > y !== by > y && x < ((bx - ax) * (y - ay)) / (by - ay) + ax) odd = !odd;
  });
  return odd;
}

function alongLine(line, roll) {
  const pieces = line.slice(1).map((to, i) => ({ from: line[i], to, metres: distance(line[i], to) }));
  const whole = pieces.reduce((sum, piece) => sum + piece.metres, 0);
  return () => {
    let left = roll() * whole;
    const piece = pieces.find((one) => {
      left -= one.metres;
      return left <= 0;
    }) ?? pieces.at(-1);
    const share = 1 + left / piece.metres;
    return piece.from.slice(0, 2).map((value, axis) => value + (piece.to[axis] - value) * share);
  };
}

function distance([ax, ay], [bx, by]) {
  const narrow = Math.cos((((ay + by) / 2) * Math.PI) / 180);
  return Math.hypot((bx - ax) * narrow, by - ay) * METRES_PER_DEGREE;
}

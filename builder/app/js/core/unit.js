/** The zone of a unit, carried in from its undisturbed edges. */
import { prepare } from './prepare.js';

const METRES_PER_DEGREE = 111320;

/**
 * checks: site checks of one unit with their kept calls. Only edge checks that read one zone
 * count, each on a side of its own: two within the pack's side distance are one side.
 */
export function unitZone(pack, checks) {
  const { settings } = prepare(pack);
  const edges = checks.filter((one) => one.role === 'edge' && one.call);
  const sides = [];
  edges.forEach((check) => {
    const zones = zonesOf(check);
    if (!zones.length) return;
    const side = sides.find((one) => sameSide(one.check, check, settings.side_apart_m));
    if (side) {
      side.ids.push(check.id);
      side.zones.push(...zones);
    } else sides.push({ check, ids: [check.id], zones });
  });
  const zoneIds = [...new Set(sides.flatMap((one) => one.zones))];
  const order = pack.zones.map((zone) => zone.id).filter((id) => zoneIds.includes(id));
  const state = sides.length < settings.sides_wanted ? 'too_few' : order.length > 1 ? 'differ' : 'carried';
  return {
    state,
    zone_id: state === 'carried' ? order[0] : null,
    zone_ids: order,
    sides: sides.length,
    check_ids: sides.flatMap((one) => one.ids),
  };
}

/** What an edge check says: one zone, the two of an edge or mosaic, or nothing. */
function zonesOf(check) {
  if (check.overruled?.zone_id) return [check.overruled.zone_id];
  if (check.call.verdict === 'zone') return [check.call.zone_id];
  return check.call.pair ?? [];
}

function sameSide(a, b, apart) {
  const from = a.place;
  const to = b.place;
  const known = [from, to].every((one) => one?.latitude_deg != null && one?.longitude_deg != null);
  if (!known) return false;
  const north = (to.latitude_deg - from.latitude_deg) * METRES_PER_DEGREE;
  const east =
    (to.longitude_deg - from.longitude_deg) * METRES_PER_DEGREE *
    Math.cos((from.latitude_deg * Math.PI) / 180);
  return Math.hypot(north, east) < apart;
}

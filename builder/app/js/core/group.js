/**
 * "Some of these": at least one member is there; not found: every member is missing. Members with
 * answers of their own are not counted twice: a member found says more, then the group adds
 * nothing; of members not found at least one of the others must be there.
 */
import { NATS_PER_CENTIBAN, roundHalfUp } from './rounding.js';

/** Centibans of "at least one of these members"; of all of them as the pack has it. */
export function someOf(key, g, free) {
  const { Z, presence, settings } = key;
  if (free.length === key.pack.groups[g].members.length) {
    return Int32Array.from(key.pack.evidence.groups[g].found);
  }
  const chance = Float64Array.from(key.neutral, (zero, z) =>
    1 - free.reduce((missing, p) => missing * (1 - presence[p * Z + z]), 1),
  );
  const prior = settings.area_cb.map((points) => Math.exp(points * NATS_PER_CENTIBAN) / Z);
  const all = prior.reduce((sum, one) => sum + one, 0);
  const mean = chance.reduce((sum, one, z) => sum + prior[z] * one, 0) / all;
  return Int32Array.from(chance, (one) =>
    roundHalfUp(((Math.log(one) - Math.log(mean)) * settings.temper) / NATS_PER_CENTIBAN),
  );
}

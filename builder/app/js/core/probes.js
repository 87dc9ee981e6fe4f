/** Sites with the builder's own answers: phone and builder must agree to the last digit. */
import { call } from './call.js';

const FIELDS = ['verdict', 'zone_id', 'next_zone_id', 'fit', 'finds_cb', 'answers', 'look_again', 'difference_cb'];

/** Differences between the builder's answers and ours; empty when all is well. */
export function checkProbes(pack) {
  const differences = [];
  pack.probes.forEach(({ site, answer }, probe) => {
    const mine = call(pack, site, { prompts: 3 });
    const note = (field, builder, phone) => {
      if (JSON.stringify(builder) !== JSON.stringify(phone)) {
        differences.push({ probe, field, builder, phone });
      }
    };
    FIELDS.forEach((field) => note(field, answer[field], mine[field]));
    note('belief', answer.belief, pack.zones.map((zone) => mine.belief[zone.id]));
    note('prompts', answer.prompts, mine.prompts.map((one) => [one.id, one.gain]));
  });
  return differences;
}

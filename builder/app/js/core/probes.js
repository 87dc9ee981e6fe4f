/** Sites with the builder's own answers: phone and builder must agree to the last digit. */
import { call } from './call.js';

const FIELDS = ['verdict', 'zone_id', 'next_zone_id', 'fit', 'finds_cb', 'answers', 'look_again', 'difference_cb'];

/** Differences between the builder's answers and ours; empty when all is well. */
export function checkProbes(pack) {
  const differences = [];
  pack.probes.forEach(({ site, answer }, probe) => {
    const mine = call(pack, site, { prompts: 2 });
    const note = (field, builder, phone) => {
      if (JSON.stringify(builder) !== JSON.stringify(phone)) {
        differences.push({ probe, field, builder, phone });
      }
    };
    FIELDS.forEach((field) => note(field, answer[field], mine[field]));
    note('belief', answer.belief, [mine.belief[mine.zone_id], mine.belief[mine.next_zone_id]]);
    note('belief_sum', answer.belief_sum, beliefSum(Object.values(mine.belief)));
    note('prompts', answer.prompts, mine.prompts.map((one) => [one.id, one.gain]));
  });
  return differences;
}

/** One whole number that moves with any zone's belief: sum of place times millionths. */
const beliefSum = (shares) =>
  shares.reduce((sum, share, at) => sum + (at + 1) * Math.round(share * 1e6), 0);

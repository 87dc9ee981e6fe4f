/**
 * The key on the phone: the same arithmetic as the builder, on a compiled pack.
 *
 * Pure: no document, no storage, no clock, no words. Every figure of the method comes in
 * `pack.settings`; every sentence is written elsewhere. All functions take the parsed pack.json
 * (`pack`) and a site check record (`site`, DESIGN of the record: place, month, disturbance,
 * questions, findings, whole_plot_searched, digging, struck); fields that are missing count as
 * not answered. Nothing is changed in either. The first use of a pack prepares typed arrays and
 * keeps them with it; `prepare(pack)` does that ahead of time.
 *
 * call(pack, site, {prompts = 8}) -> Call
 *   verdict        "thin" | "zone" | "edge" | "mosaic" | "misfit"; thin never earns a headline
 *   zone_id        zone with most belief;  next_zone_id  the runner-up
 *   pair           [zone id, zone id] of an edge or mosaic, else null
 *   belief         {zone id: 0..1 rounded to 1e-6}, in pack order
 *   scores         {zone, edge, mosaic, misfit} that were compared;  zone_share 0..1
 *   look_again     true: two more spots would help (see callThree)
 *   fit            how badly the best zone explains the finds, in standard deviations
 *   finds_cb       what the plants found say together, whole centibans
 *   answers        n, answers that tell at least two zones apart
 *   named          plants named as most plentiful;  name_more  how many names are still wanted
 *   sure           belief of the leader reached settings.sure
 *   nothing_helps  no prompt is worth asking
 *   reasons        leader minus runner-up, see reasonsBetween;  difference_cb  their sum
 *   prompts        what to look for or ask next, best first, see prompts
 *   rules_fired    [rule id], those that were not struck
 *   notes          {height_off, dead_counts (a dead tree counts as found), second_call, move_plot,
 *                  disturbed}  true or false
 *
 * prompts(pack, site, limit = 8) -> [{kind: "plant"|"question", id, gain}]
 *   gain is the expected fall in doubt, in nats, less the price of asking; only plants that can
 *   be seen in the site's month; digging only after its safety answer.
 *
 * reasonsBetween(pack, site, zoneA, zoneB) -> {difference_cb, reasons}
 *   reasons [{kind, id, answer, points_cb}]; kind is "plant", "group", "question", "rule" (id and
 *   answer as in the record; a plant's answer is its cover class, "found" or "not_found"), then
 *   "implied" (named as most plentiful), "height", "area" and "drag" (answers that repeat each
 *   other) with id and answer null. The points add up to difference_cb exactly. Lines of no
 *   points are left out.
 *
 * verdictOf(pack, site) -> the verdict part of a call alone, without prompts and reasons
 * callThree(pack, site, spotA, spotB, stand) -> {verdict, zone_id, next_zone_id, pair, belief,
 *   scores, fit}; stand "one_kind" | "changes_near" | "patches" | null
 * unitZone(pack, checks) -> {state: "carried"|"differ"|"too_few", zone_id, zone_ids, sides,
 *   check_ids}  zone carried in from edge checks on two sides or more
 * lookAlikes(pack, plantId) -> {plants: [id], groups: [id]}  for the look-alike guard
 * visible(pack, site, plantId) -> "now" | "dry" | "gone"  can it be recognised in this month
 * weighFinding(pack, site, finding) -> {points_cb: {zone id: whole centibans}}  one answer alone
 * bandOf(pack, site) -> [{low_m, high_m}] per zone, moved by slope and aspect
 * checkProbes(pack) -> [{probe, field, builder, phone}]  empty when phone and builder agree
 */
export { prepare } from './prepare.js';
export { call, verdictOf, callThree } from './call.js';
export { prompts } from './prompt.js';
export { reasonsBetween } from './reasons.js';
export { unitZone } from './unit.js';
export { lookAlikes, visible, weighFinding, bandOf } from './ask.js';
export { checkProbes } from './probes.js';

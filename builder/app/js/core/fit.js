/** How badly a zone, or two sharing the plot, explains the finds: in standard deviations. */

/**
 * Mean of two scores against the usual of the zone: surprise at the plants named as most
 * plentiful, and one minus the overlap of found with expected over the plants asked.
 * zones: one or two zone indexes.
 */
export function fitOf(key, weighed, zones) {
  const plants = weighed.answers.filter((one) => one.kind === 'plant' && one.plain && one.v > 0);
  const usual = usualOf(key, zones, plants.length);
  const scores = [];
  const named = plants.filter((one) => one.found && weighed.findings.named.includes(one.at));
  if (named.length) {
    const sum = named.reduce((all, one) => all - Math.log(foundChance(key, one, zones)), 0);
    scores.push((sum / named.length - usual.surprise) / usual.surprise_sd);
  }
  if (plants.length) {
    const miss = 1 - overlap(key, plants, zones);
    scores.push((miss - usual.miss) / usual.miss_sd);
  }
  return scores.length ? scores.reduce((a, b) => a + b, 0) / scores.length : 0;
}

/** The usual surprise and miss at about this many plants asked, mean over the zones. */
function usualOf(key, zones, asked) {
  const band = key.settings.fit.find((one) => asked <= one.asked_to) ?? key.settings.fit.at(-1);
  const mean = (name) => zones.reduce((sum, z) => sum + band[name][z], 0) / zones.length;
  return {
    surprise: mean('surprise'),
    surprise_sd: mean('surprise_sd'),
    miss: mean('miss'),
    miss_sd: mean('miss_sd'),
  };
}

const meanOver = (zones, value) => zones.reduce((sum, z) => sum + value(z), 0) / zones.length;

function foundChance(key, answer, zones) {
  const { Z } = key;
  const p = answer.at;
  return meanOver(zones, (z) => {
    const share = answer.step === 4 ? 1 : key.cover[(p * 4 + answer.step) * Z + z];
    return key.presence[p * Z + z] * share;
  });
}

/** 2 sum(found * expected) / (sum(found) + sum(expected)). */
function overlap(key, plants, zones) {
  let both = 0;
  let all = 0;
  plants.forEach((one) => {
    const seen = one.found ? 1 : one.v / 4;
    const expected = seen * meanOver(zones, (z) => key.presence[one.at * key.Z + z]);
    both += one.found ? expected : 0;
    all += (one.found ? 1 : 0) + expected;
  });
  return all > 0 ? (2 * both) / all : 0;
}

/**
 * The phone's formulas against the goldens that the builder's tests read.
 *
 *   node --test tests/js/formulas.test.js
 */
import assert from 'node:assert/strict';
import { readdirSync, readFileSync } from 'node:fs';
import { test } from 'node:test';

const GOLDENS = new URL('../goldens/', import.meta.url);
const CORE = new URL('../../builder/app/js/core/', import.meta.url);

/** Worked out when tables are built or at the desk, never in the field. */
const BUILDER_ONLY = new Set([
  'climate.heat_index',
  'climate.thornthwaite_exponent',
  'climate.thornthwaite_months_mm',
  'clipping.stage_air_dry_share',
  'cover.domin_pct',
  'production.rain_and_soil_line_kg_ha',
  'production.rain_line_kg_ha',
  'production.rain_use_kg_ha_mm',
  'terrain.aspect_coolness',
  'terrain.aspect_sunniness',
  'terrain.direct_radiation',
  'terrain.direct_radiation_to_60',
  'terrain.log_heat_load',
]);
const BUILDER_TOPICS = new Set(['diversity', 'fidelity', 'organic_matter']);
const camel = (name) => name.replace(/_([a-z0-9])/g, (_, letter) => letter.toUpperCase());

function* blocks() {
  for (const file of readdirSync(GOLDENS).filter((name) => name.endsWith('.json')).sort()) {
    const content = JSON.parse(readFileSync(new URL(file, GOLDENS), 'utf8'));
    for (const block of content.formulas ?? (content.formula ? [content] : [])) yield block;
  }
}

function revived(value) {
  if (value === 'NaN' || value === 'Infinity') return Number(value);
  if (Array.isArray(value)) return value.map(revived);
  if (value && typeof value === 'object') {
    return Object.fromEntries(Object.entries(value).map(([name, each]) => [name, revived(each)]));
  }
  return value;
}

function* differences(got, wanted, slack, at = '') {
  if (Array.isArray(wanted)) {
    if (got?.length !== wanted.length) yield `${at}: ${got?.length} entries, not ${wanted.length}`;
    for (const [i, each] of wanted.entries()) yield* differences(got?.[i], each, slack, `${at}[${i}]`);
  } else if (wanted && typeof wanted === 'object') {
    for (const [name, each] of Object.entries(wanted)) {
      const inner = slack && typeof slack === 'object' ? (slack[name] ?? slack['']) : slack;
      yield* differences(got?.[name], each, inner, `${at}.${name}`);
    }
  } else if (typeof wanted !== 'number') {
    if (got !== wanted) yield `${at}: ${got} instead of ${wanted}`;
  } else if (typeof got !== 'number' || !(Math.abs(got - wanted) <= (slack ?? 0) * (1 + 1e-9))) {
    yield `${at}: ${got} instead of ${wanted} within ${JSON.stringify(slack)}`;
  }
}

async function twin(formula) {
  const [file, name] = formula.split('.');
  const module = await import(new URL(`${file}.js`, CORE).href);
  return module[camel(name)];
}

/** rounding.js takes its number and digits one after the other, as the key's part does. */
function call(work, formula, given) {
  return formula.startsWith('rounding.') ? work(given.value, given.digits) : work(given);
}

const counted = { formulas: 0, cases: 0 };
for (const { formula, cases } of blocks()) {
  const topic = formula.split('.')[0];
  if (!formula.includes('.') || BUILDER_TOPICS.has(topic) || BUILDER_ONLY.has(formula)) continue;
  counted.formulas += 1;
  test(formula, async () => {
    const work = await twin(formula);
    assert.equal(typeof work, 'function', `core has no ${camel(formula.split('.')[1])}`);
    for (const [number, each] of cases.entries()) {
      const given = revived(each.in);
      const label = `case ${number} (${each.id})`;
      if (each.refused) {
        assert.throws(
          () => call(work, formula, given),
          (no) => no instanceof RangeError && no.message === each.refused,
          label,
        );
      } else {
        const got = call(work, formula, given);
        assert.deepEqual([...differences(got, each.out, each.abs)], [], label);
        for (const [name, total] of Object.entries(each.sums ?? {})) {
          const reached = got[name].reduce((all, value) => all + value, 0);
          assert.ok(Math.abs(reached - total) <= each.sums_abs, `${label} sum of ${name}`);
        }
      }
      counted.cases += 1;
    }
  });
}

test('the runner sees a wrong number', () => {
  const wanted = { a: [1, 2], b: 'x', c: null };
  for (const got of [{ a: [1, 2.2], b: 'x', c: null }, { a: [1, NaN], b: 'x', c: null }, { a: [1], b: 'x', c: null }, { a: [1, 2], b: 'y', c: null }, { a: [1, 2], b: 'x', c: 0 }]) {
    assert.notDeepEqual([...differences(got, wanted, 0.1)], []);
  }
  assert.deepEqual([...differences({ a: [1, 2.05], b: 'x', c: null }, wanted, 0.1)], []);
});

function* poisoned(given) {
  for (const [name, value] of Object.entries(given)) {
    if (name === 'digits') continue;
    if (typeof value === 'number') {
      yield [name, { ...given, [name]: NaN }];
      yield [name, { ...given, [name]: Infinity }];
    } else if (Array.isArray(value) && typeof value[0] === 'number') {
      yield [name, { ...given, [name]: [...value.slice(0, -1), NaN] }];
    }
  }
}

test('no formula lets a NaN or infinity through', async () => {
  let tried = 0;
  const through = new Set();
  for (const { formula, cases } of blocks()) {
    if (!formula.includes('.') || BUILDER_TOPICS.has(formula.split('.')[0]) || BUILDER_ONLY.has(formula)) continue;
    const work = await twin(formula);
    for (const each of cases.filter((one) => !one.refused).slice(0, 3)) {
      for (const [name, given] of poisoned(each.in)) {
        tried += 1;
        try {
          call(work, formula, given);
          through.add(`${formula} ${name}`);
        } catch (no) {
          if (!(no instanceof RangeError)) throw no;
        }
      }
    }
  }
  assert.deepEqual([...through], []);
  assert.ok(tried > 300, `${tried} tried`);
});

test('nothing left to the builder has a twin after all', async () => {
  for (const formula of BUILDER_ONLY) assert.equal(await twin(formula), undefined, formula);
});

test('the runner saw the whole field part', () => {
  assert.ok(counted.formulas >= 90, `${counted.formulas} formulas`);
  assert.ok(counted.cases >= 500, `${counted.cases} cases`);
});

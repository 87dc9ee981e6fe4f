/**
 * Merging and cleaning of records against the goldens that the builder's tests read.
 *   node --test tests/js/records.test.js
 */
import assert from 'node:assert/strict';
import { readFileSync } from 'node:fs';
import { test } from 'node:test';
import { cleanSite } from '../../builder/app/js/store/clean.js';
import { settled, standing } from '../../builder/app/js/store/merge.js';

const golden = (name) => JSON.parse(readFileSync(new URL(`../goldens/${name}.json`, import.meta.url), 'utf8'));

for (const one of golden('merge').standing) {
  test(`stands: ${one.id}`, () => assert.equal(standing(one.mine, one.theirs), one.out));
}

for (const one of golden('merge').settled) {
  test(`settles: ${one.id}`, () => assert.deepEqual(settled(one.chosen, one.other, one.device), one.out));
}

for (const one of golden('cleaning').cases) {
  test(`cleans: ${one.id}`, () => {
    const got = cleanSite(one.raw);
    if (one.refused) assert.deepEqual(got, { refused: one.refused });
    else assert.deepEqual({ out: got.site, changed: got.changed }, { out: one.out, changed: one.changed });
  });
}

test('the goldens hold cases', () => {
  assert.ok(golden('merge').standing.length >= 15);
  assert.ok(golden('cleaning').cases.length >= 25);
});

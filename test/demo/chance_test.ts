import assert from "node:assert/strict";
import { bell, growth, pick, shuffled, stream } from "../../lib/demo/chance.ts";
import { placeNames } from "../../lib/demo/place_names.ts";

Deno.test("stream() repeats itself for the same text and not for another", () => {
  const draws = (seed: string) => Array.from({ length: 5 }, stream(seed));
  assert.deepEqual(draws("a"), draws("a"));
  assert.notDeepEqual(draws("a"), draws("b"));
});

Deno.test("bell() has mean 0 and variance 1", () => {
  const random = stream("bell");
  const draws = Array.from({ length: 20_000 }, () => bell(random));
  const mean = draws.reduce((sum, x) => sum + x, 0) / draws.length;
  const variance = draws.reduce((sum, x) => sum + x * x, 0) / draws.length;
  // Standard errors: 1 / sqrt(20000) = 0.007 and about sqrt(2 / 20000) = 0.01.
  assert.ok(Math.abs(mean) < 0.028 && Math.abs(variance - 1) < 0.04);
});

Deno.test("growth() is e^x within 0.01 %", () => {
  for (const x of [-10, -3, -0.1, 0, 1, 2.5, 10]) {
    assert.ok(Math.abs(growth(x) / Math.exp(x) - 1) < 1e-4, `at ${x}`);
  }
});

Deno.test("pick() reaches both ends and shuffled() keeps every item and its argument", () => {
  const random = stream("pick");
  const drawn = new Set(Array.from({ length: 200 }, () => pick(random, 4)));
  assert.deepEqual([...drawn].sort(), [0, 1, 2, 3]);
  const items = [1, 2, 3, 4, 5, 6, 7, 8];
  const order = shuffled(items, random);
  assert.deepEqual(items, [1, 2, 3, 4, 5, 6, 7, 8]);
  assert.notDeepEqual(order, items);
  assert.deepEqual([...order].sort(), items);
});

Deno.test("placeNames() never repeats a name and never needs quoting in a table", () => {
  const names = placeNames(1000, stream("names"));
  assert.equal(new Set(names).size, 1000);
  assert.ok(names.every((name) => /^\p{Lu}/u.test(name) && !/[;,"\r\n]/.test(name)));
});

import assert from "node:assert/strict";
import { visitOrders } from "../../lib/inference/all_orders.ts";
import { createDealer } from "../../lib/inference/dealer.ts";
import { seedFromText } from "../../lib/inference/seed.ts";
import { shuffleInto } from "../../lib/inference/shuffle.ts";
import { openStream } from "../../lib/inference/stream.ts";

/** Largest departure of counts from an even share, in standard deviations of a single count. */
function worstDeviation(counts: Iterable<number>, cells: number, draws: number): number {
  const share = draws / cells, sd = Math.sqrt(share * (1 - 1 / cells));
  return Math.max(...[...counts].map((count) => Math.abs(count - share) / sd));
}

Deno.test("shuffleInto() gives each of the 24 orders of 4 values equally often and keeps its source", () => {
  const source = Float64Array.of(1, 2, 3, 4), target = new Float64Array(4);
  const seen = new Map<string, number>();
  for (let p = 0; p < 24_000; p++) {
    shuffleInto(target, source, openStream(seedFromText("orders"), "permutation", p));
    seen.set(target.join(), (seen.get(target.join()) ?? 0) + 1);
  }
  assert.equal(seen.size, 24);
  assert.ok(worstDeviation(seen.values(), 24, 24_000) < 4);
  assert.deepEqual(source, Float64Array.of(1, 2, 3, 4));
});

Deno.test("shuffleInto() puts the same value in the same place whatever the type of array", () => {
  const source = Float64Array.from({ length: 1001 }, (_, i) => i);
  const doubles = new Float64Array(1001), singles = new Float32Array(1001);
  shuffleInto(doubles, source, openStream(seedFromText("types"), "permutation", 5));
  shuffleInto(
    singles,
    Float32Array.from(source),
    openStream(seedFromText("types"), "permutation", 5),
  );
  assert.deepEqual([...doubles], [...singles]);
});

Deno.test("createDealer() deals each ordered pair of 5 areas equally often and never an area twice", () => {
  const dealer = createDealer(5, 2);
  dealer.open(openStream(seedFromText("deal"), "rankedBlock", 0));
  const seen = new Map<string, number>();
  for (let p = 0; p < 20_000; p++) {
    dealer.deal();
    assert.notEqual(dealer.drawn[0], dealer.drawn[1]);
    seen.set(dealer.drawn.join(), (seen.get(dealer.drawn.join()) ?? 0) + 1);
  }
  assert.equal(seen.size, 20);
  assert.ok(worstDeviation(seen.values(), 20, 20_000) < 4);
});

Deno.test("createDealer() can deal all areas there are", () => {
  const dealer = createDealer(6, 6);
  dealer.open(openStream(seedFromText("all"), "rankedBlock", 0));
  dealer.deal();
  assert.deepEqual([...dealer.drawn].sort(), [0, 1, 2, 3, 4, 5]);
});

Deno.test("visitOrders() visits n! different orders, the given one first", () => {
  const seen: string[] = [];
  visitOrders(Float64Array.of(1, 2, 3, 4, 5), (order) => seen.push(order.join()));
  assert.equal(seen[0], "1,2,3,4,5");
  assert.equal(new Set(seen).size, 120);
  assert.equal(seen.length, 120);
});

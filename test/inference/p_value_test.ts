import assert from "node:assert/strict";
import {
  clopperPearson,
  floorOfP,
  intervalOfP,
  permutationP,
  twoSidedP,
} from "../../lib/inference/p_value.ts";
import { assertClose } from "../support/close.ts";
import { referenceCase } from "../support/reference.ts";

// Source: scipy 1.17.1, scipy.stats.beta.ppf: hits, draws, confidence, lower, upper.
const SCIPY_INTERVALS = [
  [0, 999, 0.99, 0, 0.005289581620538709],
  [1, 999, 0.99, 5.017546794997186e-06, 0.007413676794532926],
  [5, 999, 0.99, 0.0010805887820293392, 0.014099182804399688],
  [500, 999, 0.99, 0.4593298980288003, 0.5416662673514681],
  [999, 999, 0.99, 0.9947104183794613, 1],
  [3, 99999, 0.95, 6.186825827607622e-06, 8.767107925187327e-05],
  [12, 999999, 0.99, 4.943136664288814e-06, 2.4144818691633375e-05],
  [499999, 999999, 0.99, 0.4987110871663001, 0.5012879128374592],
  [7, 9999999, 0.99, 2.0373380860976873e-07, 1.7133586301337457e-06],
  [250000, 9999999, 0.99, 0.02487300707873987, 0.025127450045655468],
  [30, 100, 0.9, 0.2249232243713866, 0.3842206127942016],
] as const;

Deno.test("clopperPearson() agrees with scipy from no hits to all, from a hundred draws to ten million", () => {
  for (const [hits, draws, confidence, low, high] of SCIPY_INTERVALS) {
    const found = clopperPearson(hits, draws, confidence);
    assertClose(found[0], low, 1e-10, `lower end of ${hits} in ${draws}`);
    assertClose(found[1], high, 1e-10, `upper end of ${hits} in ${draws}`);
  }
});

Deno.test("clopperPearson() refuses more hits than draws and a confidence of 1", () => {
  assert.throws(() => clopperPearson(5, 4), /5 hits in 4 draws/);
  assert.throws(() => clopperPearson(1.5, 4), RangeError);
  assert.throws(() => clopperPearson(1, 4, 1), /confidence 1/);
});

// Source: phipson-smyth-open.json, (b + 1) / (m + 1) of Phipson & Smyth 2010.
Deno.test("permutationP() is never 0 when sampled", () => {
  for (const { b, m, p_plus_one } of referenceCase("phipson-smyth-open").expected) {
    const counts = { atLeast: b, atMost: m - b, permutations: m, enumerated: false };
    assertClose(permutationP(counts, "greater"), p_plus_one);
    assertClose(twoSidedP(counts), 2 * p_plus_one);
  }
});

Deno.test("twoSidedP() doubles the smaller tail, up to 1", () => {
  const sampled = { permutations: 99, enumerated: false };
  assert.equal(twoSidedP({ ...sampled, atLeast: 99, atMost: 0 }), 2 / 100);
  assert.equal(twoSidedP({ ...sampled, atLeast: 50, atMost: 50 }), 1);
  assert.equal(twoSidedP({ ...sampled, atLeast: 99, atMost: 99 }), 1);
});

Deno.test("twoSidedP() does not add one when every order was counted or drawing stopped early", () => {
  assert.equal(
    twoSidedP({ atLeast: 12, atMost: 710, permutations: 720, enumerated: true }),
    24 / 720,
  );
  const stopped = {
    atLeast: 25,
    atMost: 9_000,
    permutations: 9_020,
    enumerated: false,
    stopped: true,
  };
  assert.equal(twoSidedP(stopped), 50 / 9_020);
  assert.throws(() => permutationP(stopped, "less"), /stopped/);
});

// Source: besag-clifford-open.json, p = h / l at the draw l that brings h hits.
Deno.test("permutationP() is h / l when the h-th hit came at draw l and that ended drawing", () => {
  const { inputs, expected } = referenceCase("besag-clifford-open");
  let hits = 0, draws = 0;
  while (hits < inputs.h) hits += inputs.exceed[draws++];
  assert.equal(draws, expected.stopped_at);
  const p = twoSidedP({
    atLeast: hits,
    atMost: draws,
    permutations: draws,
    enumerated: false,
    stopped: true,
  });
  assertClose(p, 2 * expected.p);
});

Deno.test("twoSidedP() is NaN when there was nothing to permute", () => {
  assert.ok(Number.isNaN(twoSidedP({ atLeast: 0, atMost: 0, permutations: 0, enumerated: false })));
});

Deno.test("floorOfP() is the two-sided p of no hits", () => {
  assert.equal(
    floorOfP(999),
    twoSidedP({ atLeast: 0, atMost: 999, permutations: 999, enumerated: false }),
  );
});

Deno.test("intervalOfP() doubles the interval of the rarer tail and is null where p is exact", () => {
  const counts = { atLeast: 5, atMost: 994, permutations: 999, enumerated: false };
  const [low, high] = clopperPearson(5, 999);
  assert.deepEqual(intervalOfP(counts), [2 * low, 2 * high]);
  assert.equal(intervalOfP({ ...counts, enumerated: true }), null);
  assert.equal(intervalOfP({ ...counts, permutations: 0 }), null);
});

// Source: scipy 1.17.1, scipy.stats.beta.ppf; scipy.stats.nbinom gives the tails 0.005 at both ends.
Deno.test("intervalOfP() is that of waiting for the last hit when drawing stopped at it", () => {
  const [low, high] = intervalOfP({
    atLeast: 25,
    atMost: 19_990,
    permutations: 20_000,
    enumerated: false,
    stopped: true,
  })!;
  assertClose(low, 2 * 0.0006999438300067642, 1e-10);
  assertClose(high, 2 * 0.001986566500823207, 1e-10);
});

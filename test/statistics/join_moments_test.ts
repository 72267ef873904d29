import assert from "node:assert/strict";
import { freeMoments, nonfreeMoments } from "../../lib/statistics/join_moments.ts";
import { assertClose } from "../support/close.ts";

Deno.test("nonfreeMoments() and freeMoments() agree when there are very many areas and few links", () => {
  // Drawing 400 of a million or a coin of the same odds: hardly a difference on 10 separate pairs.
  const structure = { areas: 1_000_000, joins: 10, meetings: 0 };
  const nonfree = nonfreeMoments(3, structure, 400_000, 600_000);
  const free = freeMoments(3, structure, 0.4, 0.6);
  assertClose(nonfree.expected, free.expected, 1e-5);
  assertClose(nonfree.variance, free.variance, 1e-4);
  // 10 pairs, each mixed with chance 0.48: a binomial.
  assertClose(free.variance, 10 * 0.48 * 0.52, 1e-12);
  assertClose(free.z, (3 - 4.8) / Math.sqrt(10 * 0.48 * 0.52), 1e-12);
});

Deno.test("nonfreeMoments() needs no four areas when there are two or three", () => {
  const pair = nonfreeMoments(0, { areas: 2, joins: 1, meetings: 0 }, 1, 1);
  assert.equal(pair.expected, 1); // one of each class, next to each other in any case
  assert.equal(pair.variance, 0);
});

import assert from "node:assert/strict";
import { compensatedSum } from "../../lib/weights/compensated_sum.ts";

Deno.test("compensatedSum() keeps what plain addition loses", () => {
  // Ten million tenths: plain addition drifts by 1e-4, the true sum of the binary 0.1 rounds to
  // 1e6.
  const tenths = new Float64Array(1e7).fill(0.1);
  assert.notEqual(tenths.reduce((sum, term) => sum + term, 0), 1e6);
  assert.equal(compensatedSum(tenths), 1e6);
});

Deno.test("compensatedSum() keeps small terms on either side of a large one", () => {
  assert.equal(compensatedSum([1, 1e100, 1, -1e100]), 2);
  assert.equal(compensatedSum([1e100, 1, -1e100]), 1);
  assert.equal(compensatedSum([]), 0);
});

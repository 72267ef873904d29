import assert from "node:assert/strict";
import { type Adjustment, adjustP } from "../../lib/inference/adjust.ts";
import { referenceCase } from "../support/reference.ts";

const NAMES: [Adjustment, string][] = [
  ["bonferroni", "bonferroni"],
  ["holm", "holm"],
  ["bh", "BH"],
  ["by", "BY"],
];

// Source: bh1995-15-pvalues.json and padjust-plain-20.json, base R 4 p.adjust and scipy 1.17.1.
for (const id of ["bh1995-15-pvalues", "padjust-plain-20"]) {
  Deno.test(`adjustP() agrees with base R and scipy on ${id}`, () => {
    const { inputs, expected } = referenceCase(id);
    for (const [method, name] of NAMES) {
      const found = adjustP(Float64Array.from(inputs.p), method);
      found.forEach((q, i) =>
        assert.ok(Math.abs(q - expected.adjusted[name][i]) < 1e-12, `${method} ${i}`)
      );
      assert.equal(found.filter((q) => q <= inputs.q).length, expected.rejected[name]);
    }
  });
}

Deno.test("adjustP() lets NaN pass and does not count it", () => {
  for (const method of ["none", "bonferroni", "holm", "bh", "by"] as const) {
    const alone = adjustP(Float64Array.of(0.02, 0.5, 0.01), method);
    const mixed = adjustP(Float64Array.of(NaN, 0.02, NaN, 0.5, 0.01), method);
    assert.deepEqual([...mixed], [NaN, alone[0], NaN, alone[1], alone[2]]);
  }
});

Deno.test("adjustP() keeps the order of p, is no smaller than p and leaves its input as it was", () => {
  const p = Float64Array.of(0.9, 0.03, 0.03, 0.2, 0.001);
  for (const method of ["bonferroni", "holm", "bh", "by"] as const) {
    const q = adjustP(p, method);
    for (let i = 0; i < p.length; i++) {
      assert.ok(q[i] >= p[i] && q[i] <= 1);
      for (let j = 0; j < p.length; j++) if (p[i] <= p[j]) assert.ok(q[i] <= q[j]);
    }
  }
  assert.deepEqual(p, Float64Array.of(0.9, 0.03, 0.03, 0.2, 0.001));
});

Deno.test("adjustP() refuses a p above 1 and has nothing to do when there is none", () => {
  assert.throws(() => adjustP(Float64Array.of(1.5), "bh"), /1\.5/);
  assert.deepEqual(adjustP(new Float64Array(0), "holm"), new Float64Array(0));
});

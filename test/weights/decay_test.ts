import assert from "node:assert/strict";
import { inverseWeight, kernelWeight } from "../../lib/weights/decay.ts";
import { KERNELS } from "../../lib/weights/weight_rule.ts";
import { referenceCase } from "../support/reference.ts";

// kernels-open.json: closed forms after Silverman 1986, table 3.1 (definitions from memory), CC0,
// as densities; ours drop the density constant K(0).
const { inputs, expected } = referenceCase("kernels-open");

Deno.test("kernelWeight() has the shapes of Silverman's table up to the density constant", () => {
  const names = [
    ["triangular", "triangular"],
    ["epanechnikov", "epanechnikov"],
    ["bisquare", "quartic"],
    ["gaussian", "gaussian"],
  ] as const;
  for (const [ours, theirs] of names) {
    const density: number[] = expected[theirs];
    inputs.u.forEach((u: number, at: number) => {
      const weight = kernelWeight(ours, 7 * u, 7);
      assert.ok(Math.abs(weight - density[at] / density[0]) < 1e-12, `${ours} at ${u}`);
    });
  }
});

Deno.test("kernelWeight() is 1 at 0, never rises and is never negative", () => {
  for (const kernel of KERNELS) {
    assert.equal(kernelWeight(kernel, 0, 5), 1);
    let last = 1;
    for (let d = 0; d < 50; d += 0.25) {
      const weight = kernelWeight(kernel, d, 5);
      assert.ok(weight <= last && weight >= 0, `${kernel} at ${d}`);
      last = weight;
    }
  }
});

Deno.test("kernelWeight() of a compact kernel is 0 at the bandwidth however it was rounded", () => {
  for (const kernel of ["bisquare", "triangular", "epanechnikov"] as const) {
    assert.equal(kernelWeight(kernel, 3, 3), 0);
    assert.equal(kernelWeight(kernel, 3, 3 * (1 + 2e-16)), 0);
    assert.equal(kernelWeight(kernel, 4, 3), 0);
    assert.ok(kernelWeight(kernel, 3 - 1e-9, 3) > 0);
  }
});

Deno.test("kernelWeight() of exponential is exp(-d/D) to 13 digits", () => {
  for (const d of [0.1, 1, 7.3, 40]) {
    const exact = Math.exp(-d / 3);
    assert.ok(Math.abs(kernelWeight("exponential", d, 3) / exact - 1) < 6e-14);
  }
});

Deno.test("inverseWeight() is exact for powers 1 and 2 and to 13 digits for others", () => {
  assert.equal(inverseWeight(8, 1), 0.125);
  assert.equal(inverseWeight(8, 2), 0.015625);
  assert.ok(Math.abs(inverseWeight(4, 1.5) - 0.125) < 1e-14);
  assert.ok(Math.abs(inverseWeight(9, 0.5) - 1 / 3) < 1e-13);
  assert.equal(inverseWeight(1e-200, 3), Infinity);
});

import assert from "node:assert/strict";
import { permuteMoran } from "../../lib/inference/permute_global.ts";
import { permutationP } from "../../lib/inference/p_value.ts";
import { type NullMap, shuffledMap, simulateMoran } from "../../lib/inference/simulate_global.ts";
import { drawUniform } from "../../lib/inference/stream.ts";
import { UnfitDataError } from "../../lib/layer/errors.ts";
import { gridWeights, normalNumbers } from "../support/maps.ts";

const weights = gridWeights(6, 6);

Deno.test("simulateMoran() agrees with permuteMoran() within 4 standard errors when the null is shuffling", async () => {
  const values = normalNumbers(36, "simulate").map((value, i) => value + i / 24);
  const options = { permutations: 4_999 };
  const [simulated] = await simulateMoran(values, [weights], shuffledMap(values), options);
  const [permuted] = await permuteMoran(values, [weights], options);
  assert.ok(Math.abs(simulated.observed - permuted.observed) < 1e-12);
  const p = permutationP(permuted, "greater"), q = permutationP(simulated, "greater");
  assert.ok(Math.abs(p - q) < 4 * Math.sqrt(2 * p * (1 - p) / 4_999) + 1e-3, `${p} ${q}`);
});

Deno.test("simulateMoran() judges by the null it is given", async () => {
  const values = Float64Array.from(
    { length: 36 },
    (_, i) => Math.floor(i / 6) + normalNumbers(36, "trend")[i],
  );
  const noise: NullMap = (stream) => Float64Array.from({ length: 36 }, () => drawUniform(stream));
  const trend: NullMap = (stream) =>
    Float64Array.from({ length: 36 }, (_, i) => Math.floor(i / 6) + drawUniform(stream));
  const [against, with_] = await Promise.all(
    [noise, trend].map((nullMap) =>
      simulateMoran(values, [weights], nullMap, { permutations: 199 })
    ),
  );
  assert.ok(permutationP(against[0], "greater") <= 0.01);
  assert.ok(permutationP(with_[0], "greater") > 0.5);
});

Deno.test("simulateMoran() refuses simulated maps that are flat or of another length", async () => {
  const values = normalNumbers(36, "flat");
  await assert.rejects(
    simulateMoran(values, [weights], () => new Float64Array(36)),
    UnfitDataError,
  );
  await assert.rejects(
    simulateMoran(values, [weights], () => normalNumbers(35, "short")),
    /36 values with 35 simulated/,
  );
});

import assert from "node:assert/strict";
import { checkConstantRisk } from "../../lib/inference/constant_risk.ts";
import { constantRiskMaps } from "../../lib/inference/constant_risk_maps.ts";
import { oneByOne, shuffledMaps } from "../../lib/inference/null_maps.ts";
import { permuteMoran } from "../../lib/inference/permute_global.ts";
import { permutationP } from "../../lib/inference/p_value.ts";
import { simulateMoran } from "../../lib/inference/simulate_global.ts";
import { drawUniform } from "../../lib/inference/stream.ts";
import { UnfitDataError } from "../../lib/layer/errors.ts";
import { standardizedRates } from "../../lib/prepare/standardized_rates.ts";
import { gridWeights, normalNumbers } from "../support/maps.ts";

const weights = gridWeights(6, 6);

Deno.test("simulateMoran() agrees with permuteMoran() within 4 standard errors when the null is shuffling", async () => {
  const values = normalNumbers(36, "simulate").map((value, i) => value + i / 24);
  const options = { permutations: 4_999 };
  const [simulated] = await simulateMoran(values, [weights], shuffledMaps(values), options);
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
  const noise = oneByOne((stream) => Float64Array.from({ length: 36 }, () => drawUniform(stream)));
  const trend = oneByOne((stream) =>
    Float64Array.from({ length: 36 }, (_, i) => Math.floor(i / 6) + drawUniform(stream))
  );
  const [against, with_] = await Promise.all(
    [noise, trend].map((model) => simulateMoran(values, [weights], model, { permutations: 199 })),
  );
  assert.ok(permutationP(against[0], "greater") <= 0.01);
  assert.ok(permutationP(with_[0], "greater") > 0.5);
});

Deno.test("simulateMoran() refuses simulated maps that are flat or of another length", async () => {
  const values = normalNumbers(36, "flat");
  await assert.rejects(
    simulateMoran(values, [weights], oneByOne(() => new Float64Array(36))),
    UnfitDataError,
  );
  await assert.rejects(
    simulateMoran(values, [weights], oneByOne(() => normalNumbers(35, "short"))),
    /36 values with 35 simulated/,
  );
});

Deno.test("simulateMoran() under maps of constant risk counts what checkConstantRisk() counts", async () => {
  const population = normalNumbers(36, "people").map((x) => Math.round(1000 * Math.exp(x / 2)));
  const cases = normalNumbers(36, "cases").map((x, i) => Math.round(population[i] / 10 + 3 * x));
  const counts = { cases, population };
  const { moran } = await checkConstantRisk(counts, weights, { valuesOf: standardizedRates });
  const [simulated] = await simulateMoran(
    standardizedRates(counts),
    [weights],
    (streams) =>
      constantRiskMaps(counts, streams).map((drawn) =>
        standardizedRates({ ...counts, cases: drawn })
      ),
  );
  assert.deepEqual([simulated.atLeast, simulated.atMost], [moran.atLeast, moran.atMost]);
});

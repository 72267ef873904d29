import assert from "node:assert/strict";
import { permuteMoran } from "../../lib/inference/permute_global.ts";
import { permutationP, twoSidedP } from "../../lib/inference/p_value.ts";
import { UnfitDataError, UsageError } from "../../lib/layer/errors.ts";
import { moranI } from "../../lib/statistics/moran.ts";
import { spatialLag } from "../../lib/weights/lag.ts";
import { assertClose } from "../support/close.ts";
import { kolmogorovSmirnov } from "../support/kolmogorov.ts";
import {
  chainWeights,
  completeWeights,
  gridWeights,
  normalNumbers,
  unequalWeights,
} from "../support/maps.ts";
import { ncWeights } from "../support/nc_weights.ts";
import {
  numberColumn,
  referenceCase,
  rowStandardized,
  textColumn,
  weightsOfListFile,
  weightsOfMatrix,
} from "../support/reference.ts";

// Source: enum-*.json, all orders counted one by one with numpy.
for (
  const map of ["grid2x3_rook", "grid2x4_queen_rowstd", "invdist6", "island7", "knn7_asym", "path6"]
) {
  Deno.test(`permuteMoran() counts every order when the map is ${map}`, async () => {
    const { inputs, expected } = referenceCase(`enum-${map}`);
    const { count_ge, count_le, total, observed } = expected.moran_I;
    const [found] = await permuteMoran(Float64Array.from(inputs.x), [weightsOfMatrix(inputs.W)]);
    assert.deepEqual([found.atLeast, found.atMost, found.permutations], [
      count_ge,
      count_le,
      total,
    ]);
    assert.ok(found.enumerated);
    assertClose(found.observed, observed, 1e-12);
    assert.equal(found.drawn.length, total);
    assertClose(found.drawn[0], observed, 1e-12);
    const mean = found.drawn.reduce((sum, value) => sum + value, 0) / total;
    assertClose(mean, expected.moran_I.exact_mean, 1e-9);
  });
}

// Source: enum-grid3x3_rook.json: 9 areas are sampled, and the share must lie within 4 standard errors.
Deno.test("permuteMoran() samples within 4 standard errors of all orders when there are 9 areas", async () => {
  const { inputs, expected } = referenceCase("enum-grid3x3_rook");
  const { count_ge, total } = expected.moran_I;
  const [found] = await permuteMoran(Float64Array.from(inputs.x), [weightsOfMatrix(inputs.W)], {
    permutations: 20_000,
  });
  const p = count_ge / total;
  assert.ok(!found.enumerated);
  assert.ok(Math.abs(found.atLeast / 20_000 - p) < 4 * Math.sqrt(p * (1 - p) / 20_000));
});

// Source: mc-global-*.json, 400,000 random permutations with numpy; tolerance as the cases say.
Deno.test("permuteMoran() agrees with 400,000 permutations drawn by numpy on North Carolina and Ireland", async () => {
  const rate = (year: string) => {
    const births = numberColumn("nc.csv", `BIR${year}`);
    return numberColumn("nc.csv", `SID${year}`).map((deaths, i) => deaths / births[i]);
  };
  const ireland = weightsOfListFile(
    "eire_neighbours_cliff_ord.json",
    textColumn("eire_table.csv", "county"),
  );
  const cases = [
    ["mc-global-nc-rate74-queen", rate("74"), ncWeights("queen_unscaled")],
    ["mc-global-nc-rate79-queen", rate("79"), ncWeights("queen_unscaled")],
    ["mc-global-nc-rate74-cressie-chan", rate("74"), ncWeights("cressie_chan_unscaled")],
    ["mc-global-eire-INCOME", numberColumn("eire_table.csv", "INCOME"), ireland],
  ] as const;
  const m = 9_999;
  for (const [id, values, weights] of cases) {
    const { expected } = referenceCase(id);
    const [found] = await permuteMoran(values, [weights], { permutations: m });
    assertClose(found.observed, expected.I);
    const p = expected.I_p_upper;
    const allowed = 4 * Math.sqrt(p * (1 - p) * (1 / m + 1 / 400_000));
    assert.ok(Math.abs(permutationP(found, "greater") - p) < allowed + 1 / m, id);
    const mean = found.drawn.reduce((sum, value) => sum + value, 0) / m;
    const sd = Math.sqrt(found.drawn.reduce((sum, value) => sum + (value - mean) ** 2, 0) / m);
    assertClose(sd, expected.randomisation_sd, 4 / Math.sqrt(m), id);
  }
});

Deno.test("permuteMoran() permutes the same maps for every definition, however many there are", async () => {
  const values = normalNumbers(60, "shared");
  const definitions = [
    gridWeights(6, 10),
    gridWeights(6, 10, { corners: true }),
    unequalWeights(gridWeights(6, 10), "w"),
  ];
  const together = await permuteMoran(values, definitions, { permutations: 199 });
  for (let d = 0; d < definitions.length; d++) {
    const [alone] = await permuteMoran(values, [definitions[d]], { permutations: 199 });
    assert.deepEqual(alone, together[d]);
  }
});

Deno.test("permuteMoran() draws values of I that moranI() gives for some order of the values", async () => {
  const values = Float64Array.of(1, 1, 1, 1, 1, 1, 1, 1, 2);
  const weights = chainWeights(9);
  const [{ drawn }] = await permuteMoran(values, [weights], { permutations: 99 });
  const possible = Array.from({ length: 9 }, (_, at) => {
    const order = new Float64Array(9).fill(1);
    order[at] = 2;
    return moranI(order, weights).value;
  });
  for (const value of drawn) assert.ok(possible.some((each) => Math.abs(each - value) < 1e-12));
});

Deno.test("permuteMoran() begins with the same permutations when more are asked for, and changes with the seed", async () => {
  const values = normalNumbers(40, "seed"), weights = gridWeights(5, 8);
  const [few] = await permuteMoran(values, [weights], { permutations: 99 });
  const [many] = await permuteMoran(values, [weights], { permutations: 500 });
  const [other] = await permuteMoran(values, [weights], { permutations: 99, seed: "another" });
  assert.deepEqual(many.drawn.slice(0, 99), few.drawn);
  assert.notDeepEqual(other.drawn, few.drawn);
});

Deno.test("permuteMoran() has p = 1 when everybody is everybody's neighbor", async () => {
  const [found] = await permuteMoran(normalNumbers(12, "complete"), [completeWeights(12)]);
  assert.equal(found.atLeast, 999);
  assert.equal(found.atMost, 999);
  assert.equal(twoSidedP(found), 1);
});

Deno.test("permuteMoran() has a uniform one-sided p under the null on 400 simulated maps", async () => {
  const weights = rowStandardized(gridWeights(6, 6, { corners: true }));
  const p: number[] = [];
  for (let map = 0; map < 400; map++) {
    const [found] = await permuteMoran(normalNumbers(36, `null ${map}`), [weights], {
      permutations: 199,
      seed: `${map}`,
    });
    p.push(permutationP(found, "greater"));
  }
  // 1.63 / sqrt(400) is the 1 % point of the Kolmogorov-Smirnov distance; p steps by 1/200.
  assert.ok(kolmogorovSmirnov(p) < 1.63 / 20 + 1 / 200);
});

Deno.test("permuteMoran() rejects more often the stronger the planted signal", async () => {
  const weights = rowStandardized(gridWeights(7, 7));
  const rejected: number[] = [];
  for (const strength of [0, 0.4, 0.8, 1.6]) {
    let count = 0;
    for (let map = 0; map < 60; map++) {
      const noise = normalNumbers(49, `signal ${map}`);
      const values = spatialLag(weights, noise).map((lag, i) => noise[i] + strength * lag);
      const [found] = await permuteMoran(values, [weights], { permutations: 199 });
      if (twoSidedP(found) <= 0.05) count++;
    }
    rejected.push(count);
  }
  assert.ok(rejected[0] <= 8, String(rejected)); // 3 expected, 8 is 3 standard deviations above
  for (let s = 1; s < rejected.length; s++) {
    assert.ok(rejected[s] > rejected[s - 1], String(rejected));
  }
});

Deno.test("permuteMoran() refuses numbers of permutations that are too small, too large or not whole", async () => {
  const values = normalNumbers(9, "bad"), weights = gridWeights(3, 3);
  for (const permutations of [0, 98, 99.5, 10_000_000, NaN]) {
    await assert.rejects(permuteMoran(values, [weights], { permutations }), (error) => {
      return error instanceof UsageError && error.message.includes(`${permutations} permutations`);
    });
  }
});

Deno.test("permuteMoran() refuses data without an answer", async () => {
  const weights = gridWeights(3, 3);
  await assert.rejects(permuteMoran(new Float64Array(9).fill(2), [weights]), UnfitDataError);
  for (const value of [NaN, Infinity]) {
    const values = Float64Array.of(1, 2, value, 4, 5, 6, 7, 8, 9);
    await assert.rejects(permuteMoran(values, [weights]), UnfitDataError);
  }
  await assert.rejects(permuteMoran(Float64Array.of(1, 2), [chainWeights(2)]), /at least 3/);
  await assert.rejects(permuteMoran(normalNumbers(8, "length"), [weights]), RangeError);
  const negative = { ...weights, values: weights.values.map((value) => -value) };
  await assert.rejects(
    permuteMoran(normalNumbers(9, "negative"), [weights, negative]),
    /sum to -24/,
  );
  const nothing = { ...weights, values: new Float64Array(weights.values.length) };
  await assert.rejects(permuteMoran(normalNumbers(9, "none"), [nothing]), /no area has a neighbor/);
  for (const weight of [NaN, Infinity]) {
    const odd = { ...weights, values: weights.values.with(3, weight) };
    await assert.rejects(permuteMoran(normalNumbers(9, "odd"), [odd]), /sum to (NaN|Infinity)/);
  }
});

Deno.test("permuteMoran() rejects with the signal's reason when aborted on the way, and reports progress", async () => {
  const controller = new AbortController();
  const shares: number[] = [];
  const onProgress = (share: number) => {
    shares.push(share);
    if (shares.length === 2) controller.abort(new Error("enough"));
  };
  const run = permuteMoran(normalNumbers(2500, "abort"), [gridWeights(50, 50)], {
    permutations: 99_999,
    workers: 1,
    signal: controller.signal,
    onProgress,
  });
  await assert.rejects(run, /enough/);
  assert.equal(shares.length, 2);
  assert.ok(shares[0] < shares[1] && shares[1] < 1);
});

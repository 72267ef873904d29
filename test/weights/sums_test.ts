import assert from "node:assert/strict";
import type { Topology } from "../../lib/neighbors/topology.ts";
import { weightSums } from "../../lib/weights/sums.ts";
import { weigh, type WeighOptions } from "../../lib/weights/weigh.ts";
import { parseWeightRule } from "../../lib/weights/weight_rule.ts";
import type { Weights } from "../../lib/weights/weights.ts";
import { assertClose } from "../support/close.ts";
import { randomTopology, topologyWhere } from "../support/links.ts";
import { randomNumbers } from "../support/maps.ts";
import { ncWeights } from "../support/nc_weights.ts";
import { numberColumn, referenceCase } from "../support/reference.ts";

/** The definitions of S0, S1 and S2 on the full matrix. */
function plainSums({ offsets, indices, values }: Weights) {
  const n = offsets.length - 1;
  const w = Array.from({ length: n }, () => new Float64Array(n));
  for (let i = 0; i < n; i++) {
    for (let link = offsets[i]; link < offsets[i + 1]; link++) w[i][indices[link]] = values[link];
  }
  let s0 = 0, s1 = 0, s2 = 0;
  for (let i = 0; i < n; i++) {
    let both = 0;
    for (let j = 0; j < n; j++) {
      s0 += w[i][j];
      s1 += (w[i][j] + w[j][i]) ** 2 / 2;
      both += w[i][j] + w[j][i];
    }
    s2 += both ** 2;
  }
  return { s0, s1, s2 };
}

Deno.test("weightSums() follows the definitions when links are one-way and weights uneven", () => {
  // w01 = 2, w10 = 3, w12 = 1, area 3 alone. S1 = (5² + 5² + 1 + 1) / 2 = 26. Row plus column sums:
  // 2 + 3, 4 + 2, 0 + 1, 0, so S2 = 25 + 36 + 1.
  const weights: Weights = {
    offsets: Uint32Array.of(0, 1, 3, 3, 3),
    indices: Uint32Array.of(1, 0, 2),
    values: Float64Array.of(2, 3, 1),
    equalInRows: false,
  };
  assert.deepEqual(weightSums(weights), { s0: 6, s1: 26, s2: 62 });
});

Deno.test("weightSums() agrees with the full matrix on random one-way links", () => {
  for (let round = 0; round < 20; round++) {
    const topology = randomTopology(5 + round, 0.3, `sums ${round}`);
    const given = randomNumbers(topology.indices.length, `weights ${round}`).map((u) => u + 0.01);
    for (const standardize of ["none", "row", "total", "variance"] as const) {
      const weights = weigh({ ...topology, given }, { weights: { kind: "given" }, standardize });
      const sums = weightSums(weights), plain = plainSums(weights);
      for (const key of ["s0", "s1", "s2"] as const) {
        assertClose(sums[key], plain[key], 1e-13, key);
      }
    }
  }
});

Deno.test("weightSums() is 0 when nobody has a neighbor", () => {
  const alone = weigh({ offsets: Uint32Array.of(0, 0), indices: new Uint32Array(0) });
  assert.deepEqual(weightSums(alone), { s0: 0, s1: 0, s2: 0 });
});

// North Carolina counties: seats in whole miles (nc_points.csv, from r-cran-sf 1.0-9 and
// r-cran-spdata 2.2.1-1, MIT and CC0). Expected sums: nc-global-*.json, computed with numpy 2.4.6.
// Who is whose neighbor comes from the slow twin in support; the weights are ours.
const east = numberColumn("nc_points.csv", "seat_east_miles");
const north = numberColumn("nc_points.csv", "seat_north_miles");
const seats = Float64Array.from({ length: 200 }, (_, at) => (at % 2 ? north : east)[at >> 1]);

function withinMiles(reach: number): Topology {
  return topologyWhere(100, (i, j) => Math.hypot(east[i] - east[j], north[i] - north[j]) <= reach);
}

/** Who, how much and how scaled; miles stand as meters here. */
const SCHEMES: Record<string, () => [Topology, string, WeighOptions["standardize"]]> = {
  band30_row: () => [withinMiles(30), "equal", "row"],
  band30_unscaled: () => [withinMiles(30), "equal", "none"],
  bisquare_40_row: () => [withinMiles(50), "bisquare:40m", "row"],
  cressie_chan_unscaled: () => [ncWeights("cressie_chan_unscaled"), "equal", "none"],
  epanechnikov_40_row: () => [withinMiles(50), "epanechnikov:40m", "row"],
  gauss_h25_cut60_row: () => [withinMiles(60), "gaussian:25m", "row"],
  invd1_60mi_row: () => [withinMiles(60), "inverse:1", "row"],
  invd1_60mi_unscaled: () => [withinMiles(60), "inverse:1", "none"],
  invd2_60mi_row: () => [withinMiles(60), "inverse:2", "row"],
  knn4_centroid_row: () => [ncWeights("knn4_centroid_unscaled"), "equal", "row"],
  queen_row: () => [ncWeights("queen_unscaled"), "equal", "row"],
  queen_unscaled: () => [ncWeights("queen_unscaled"), "equal", "none"],
  rook_unscaled: () => [ncWeights("rook_unscaled"), "equal", "none"],
};

for (const [scheme, build] of Object.entries(SCHEMES)) {
  Deno.test(`weightSums() gives S0, S1 and S2 of the North Carolina case ${scheme}`, () => {
    const { rate74 } = referenceCase(`nc-global-${scheme}`).expected;
    const [topology, rule, standardize] = build();
    const sums = weightSums(
      weigh(topology, { weights: parseWeightRule(rule), standardize, points: seats }),
    );
    assertClose(sums.s0, rate74.S0, 1e-9, "S0");
    assertClose(sums.s1, rate74.S1, 1e-9, "S1");
    assertClose(sums.s2, rate74.S2, 1e-9, "S2");
  });
}

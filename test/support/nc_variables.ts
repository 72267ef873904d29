/**
 * The variables of North Carolina that the reference cases name.
 *
 * @module
 */
import { numberColumn } from "./reference.ts";

/** All weights of the global cases; `ncWeights` builds each. */
export const NC_WEIGHTS = [
  "band30_row",
  "band30_unscaled",
  "bisquare_40_row",
  "cressie_chan_unscaled",
  "epanechnikov_40_row",
  "gauss_h25_cut60_row",
  "invd1_60mi_row",
  "invd1_60mi_unscaled",
  "invd2_60mi_row",
  "knn4_centroid_row",
  "queen_row",
  "queen_unscaled",
  "rook_unscaled",
];

/** Deaths per 1000 births, their Freeman-Tukey transform, and the share of non-white births. */
export function ncVariables(year: "74" | "79"): Record<string, Float64Array> {
  const deaths = numberColumn("nc.csv", `SID${year}`);
  const births = numberColumn("nc.csv", `BIR${year}`);
  const nonWhite = numberColumn("nc.csv", `NWBIR${year}`);
  return {
    [`rate${year}`]: deaths.map((s, i) => 1000 * s / births[i]),
    [`ft${year}`]: deaths.map((s, i) =>
      Math.sqrt(1000) * (Math.sqrt(s / births[i]) + Math.sqrt((s + 1) / births[i]))
    ),
    [`nw${year}`]: nonWhite.map((s, i) => s / births[i]),
  };
}

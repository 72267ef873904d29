import { standardizedRates } from "../../lib/prepare/standardized_rates.ts";
import { ebIndex } from "../../lib/statistics/eb_index.ts";
import { assertClose } from "../support/close.ts";
import { chainWeights } from "../support/maps.ts";
import { ncWeights } from "../support/nc_weights.ts";
import { numberColumn, referenceCase } from "../support/reference.ts";

// Source: eb-nc74.json, computed with numpy 2.4.6; formulas of Assunção & Reis 1999.
Deno.test("ebIndex() agrees with North Carolina in both forms", () => {
  const rates = standardizedRates({
    cases: numberColumn("nc.csv", "SID74"),
    population: numberColumn("nc.csv", "BIR74"),
  });
  const { expected } = referenceCase("eb-nc74");
  const { value, asPublished } = ebIndex(rates, ncWeights("queen_unscaled"));
  assertClose(value, expected.ebi_centred);
  assertClose(asPublished, expected.ebi_paper);
});

Deno.test("ebIndex() gives the worked values of a chain", () => {
  // z = 0, 1, 2 in a row of 3 with 4 links of weight 1; mean 1, Σ (z - 1)² = 2.
  // Centered: products -1·0 and 0·1, twice each: 0. As published: 3/4 · 2 · (0·1 + 1·2) / 2 = 1.5.
  const { value, asPublished } = ebIndex(Float64Array.of(0, 1, 2), chainWeights(3));
  assertClose(value, 0, 1e-14);
  assertClose(asPublished, 1.5, 1e-14);
});

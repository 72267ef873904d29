/**
 * The part of `results.json` that only a rate has.
 *
 * @module
 */
import * as z from "zod";
import { FUNNEL_WORDS, type FunnelWord } from "../prepare/funnel.ts";

const count = z.number().int().min(0);
const figure = z.number().nullable();

/** Schema of `runs[].rate`. */
export const rateSchema = z.object({
  cases: z.string().describe("Field of the cases"),
  population: z.string().describe("Field of the population"),
  per: z.number().describe("Rates are per so many of the population"),
  share: z.boolean().describe("True where nobody counts twice: cases are part of the population"),
  totalCases: z.number(),
  totalPopulation: z.number(),
  overall: figure.describe("All cases over the whole population, per `per`"),
  between: figure.describe(
    "Standard deviation of the rates between areas beyond chance (Marshall 1991), per `per`; 0 where there is none",
  ),
  tested: z.enum(["standardized", "freeman-tukey"]).describe(
    "What was tested: standardized rates (Assunção & Reis 1999) or Freeman-Tukey values",
  ),
  overdispersion: z.object({
    index: figure.describe(
      "Potthoff & Whittinghill 1966; 1 where counts vary as chance would make them",
    ),
    atLeast: count,
    p: figure.describe("One-sided, from the maps of constant risk"),
  }),
  constantRisk: z.object({
    maps: count.describe("Maps with the cases dealt out over the populations at one risk for all"),
    mean: figure.describe("Mean of Moran's I over these maps"),
    atLeast: count,
    atMost: count,
    p: figure.describe("Two-sided, of the main definition's Moran's I"),
  }),
  funnel: z.record(z.enum(FUNNEL_WORDS), count).describe(
    "Areas by where their count lies against exact limits of 95 % and 99.8 %, binomial for a share, else Poisson",
  ),
});
/** What a run found on a rate. */
export type RateResults = z.infer<typeof rateSchema>;

/** Per-area results of a rate, each array of length `layer.count`; NaN and null where there is none. */
export interface AreaRates {
  /** Raw rate, per so many of the population as the run shows. */
  readonly rate: Float64Array;
  /** Shrunken toward the overall rate (Marshall 1991). */
  readonly shrunk: Float64Array;
  /** Shrunken toward the rate of neighbors and area together; NaN where alone. */
  readonly shrunkLocal: Float64Array;
  readonly funnel: readonly (FunnelWord | null)[];
}

/**
 * What went in, what was left out and why.
 *
 * @module
 */
import { counted } from "../sweep/phrases.ts";
import type { Results } from "../write/results.ts";
import { type Fact, facts, nameList, section } from "./html_parts.ts";
import { type Markup, markup } from "./markup.ts";
import { percentText, valueText, wholeText } from "./number_text.ts";
import type { ReportInput } from "./report_input.ts";
import { transformWords } from "./value_methods.ts";

/** Layer, values, areas left out, kinds of missing values, and the join. */
export function dataSection({ results }: ReportInput): Markup {
  const { join } = results;
  return section(
    "data",
    "Data",
    facts([...layerFacts(results), ...valueFacts(results)]),
    join && markup`<h3>Join with ${join.table}</h3>\n${facts(joinFacts(join))}`,
  );
}

function layerFacts({ layer }: Results): Fact[] {
  const { metricCrs } = layer;
  return [
    ["File", layer.name === "" ? layer.source : `${layer.source}, layer ${layer.name}`],
    [
      "Areas",
      `${wholeText(layer.features)} ${shapeWords(layer.shape)}, ${
        wholeText(layer.used)
      } of them used`,
    ],
    ["Coordinates", layer.crs ?? "the file does not say what its coordinates mean"],
    ["Distances", metricCrs ? distanceText(metricCrs) : "none were measured"],
    ["Left out", countList(layer.leftOut.map(({ reason, count }) => [reason, count]))],
  ];
}

function shapeWords(shape: string): string {
  const single = ["polygon", "point", "line"].includes(shape);
  return single
    ? `${shape}s`
    : shape === "mixed"
    ? "shapes of several kinds"
    : "rows without shapes";
}

function distanceText(metric: NonNullable<Results["layer"]["metricCrs"]>): string {
  const { name, definition, worstDistortion, unit } = metric;
  const where = name === definition ? name : `${name} (${definition})`;
  const error = worstDistortion === null
    ? ""
    : `, wrong by at most ${percentOf(worstDistortion)} over this extent`;
  return `in ${where}, unit ${unit}${error}`;
}

function percentOf(share: number): string {
  return `${valueText(Number((100 * share).toPrecision(2)))}\u00A0%`;
}

function valueFacts({ runs, missingValues }: Results): Fact[] {
  const { indicator, values } = runs[0];
  return [
    ["Value tested", markup`<code>${indicator}</code>, ${transformWords(runs[0])}`],
    [
      "Tested values",
      `mean ${valueText(values.mean)}, standard deviation ${
        valueText(values.sd)
      } (divisor n), from ${valueText(values.min)} to ${valueText(values.max)}`,
    ],
    ["In place of a number", countList(missingValues.map(({ kind, count }) => [kind, count]))],
  ];
}

function countList(list: readonly (readonly [string, number])[]): string {
  if (list.length === 0) return "nothing";
  return list.map(([what, count]) => `${what} (${counted(count, "area")})`).join("; ");
}

function joinFacts(join: NonNullable<Results["join"]>): Fact[] {
  const all = join.matched + join.layerOnlyCount;
  const keys = (names: readonly string[], total: number) =>
    total === 0 ? "none" : `${counted(total, "key")}: ${nameList(names, total)}`;
  return [
    ["Keys", `${join.layerKey} of the layer with ${join.tableKey} of the table`],
    [
      "Matched",
      `${counted(join.matched, "area")} of ${wholeText(all)} (${percentText(join.matched / all)})`,
    ],
    ["Only in the layer", keys(join.layerOnly, join.layerOnlyCount)],
    ["Only in the table", keys(join.tableOnly, join.tableOnlyCount)],
    ...(join.hint ? [["Hint", join.hint] as const] : []),
  ];
}

/**
 * Whether the finding would stand under other definitions of neighbor.
 *
 * @module
 */
import { counted } from "../sweep/phrases.ts";
import { definitionsTried } from "../sweep/verdict_input.ts";
import type { DefinitionResult, SweepResults } from "../write/results.ts";
import { FAMILY_LOOKS } from "./family_looks.ts";
import { type Fact, facts, figure, nameList, section, table } from "./html_parts.ts";
import { type Markup, markup, type Part } from "./markup.ts";
import { decimalText, percentText, pText, wholeText } from "./number_text.ts";
import type { FigureName } from "./plots.ts";
import { areaName, type ReportInput } from "./report_input.ts";
import { byFamily, definitionText } from "./sweep_order.ts";

const TITLE = "Would it still stand?";

/** Areas named one by one where definitions disagree. */
const MOST_NAMED = 40;

/** Specification curve, joint test, steadiness and a table of all definitions. */
export function sweepSection(
  input: ReportInput,
  figures: ReadonlyMap<FigureName, string>,
): Markup {
  const { sweep } = input.results;
  if (sweep === null) {
    return section(
      "sweep",
      TITLE,
      markup`<p>No other definition of neighbor was tried, so whether the answer depends on that choice is open.</p>\n`,
    );
  }
  const tried = definitionsTried(sweep);
  return section(
    "sweep",
    TITLE,
    markup`<p>Who counts as a neighbor is a choice. The same test was run under ${tried} definitions, on the same permuted maps, so that choosing the definition with the best result cannot pass for evidence.</p>\n`,
    figure(
      figures.get("sweep"),
      "Moran's I under each definition, by kind. Dashed lines: what is expected by chance, and the main definition.",
    ),
    findings(input, sweep),
    definitionTable(sweep, input.results.runs[0].local.level),
  );
}

function findings(input: ReportInput, { joint, stability }: SweepResults): Markup {
  const { level } = input.results.runs[0].local;
  const listed = (term: string, rows: readonly number[]): Fact | null => {
    if (rows.length === 0) return null;
    const names = rows.slice(0, MOST_NAMED).map((row) => areaName(input, row));
    return [term, `${counted(rows.length, "area")}: ${nameList(names, rows.length)}`];
  };
  return facts([
    [
      "Joint test",
      `p = ${pText(joint.p, level)} for the median standard score of ${
        decimalText(joint.median)
      } over all definitions, kinds counted equally`,
    ],
    [
      "Share that passes",
      `${
        percentText(joint.share)
      } of the definitions find ${joint.direction} autocorrelation at level ${level}; p = ${
        pText(joint.shareP, level)
      } for so large a share`,
    ],
    [
      "Areas",
      `${wholeText(stability.steady)} steady, ${wholeText(stability.mostly)} mostly, ${
        wholeText(stability.fragile)
      } fragile; ${counted(stability.quiet, "area")} flagged by no definition`,
    ],
    listed("Flagged only elsewhere", stability.onlyElsewhere),
    listed("High under one definition, low under another", stability.flips),
  ]);
}

function definitionTable({ definitions }: SweepResults, level: number): Markup {
  const numbers = (title: string) => ({ title, numbers: true });
  return table(
    "All definitions; overlap compares the flagged areas with those of the main definition",
    [
      { title: "Definition" },
      { title: "Kind" },
      numbers("Neighbors, mean"),
      numbers("Alone"),
      numbers("Pieces"),
      numbers("Moran's I"),
      numbers("Score"),
      numbers("p"),
      numbers("Adjusted p"),
      numbers("Areas flagged"),
      numbers("Overlap"),
    ],
    byFamily(definitions).flatMap((group) =>
      group.definitions.map((definition) => cellsOf(definition, level))
    ),
  );
}

function cellsOf(definition: DefinitionResult, level: number): Part[] {
  const { family, islands, components, value, z, p, pAdjusted } = definition;
  return [
    nameCell(definition),
    FAMILY_LOOKS[family].title,
    decimalText(definition.meanNeighbors, 1),
    wholeText(islands),
    wholeText(components),
    decimalText(value, 3),
    decimalText(z),
    pText(p, level),
    pText(pAdjusted, level),
    wholeText(definition.significantAreas),
    percentText(definition.overlap),
  ];
}

function nameCell(definition: DefinitionResult): Markup {
  const { main, sameAs } = definition;
  const same = sameAs.length > 0 &&
    markup`<br>same weights: ${
      sameAs.map((rule, i) => markup`${i > 0 && ", "}<code>${rule}</code>`)
    }`;
  const name = markup`<code>${definitionText(definition)}</code>`;
  return main
    ? markup`<span class="main-definition">${name} (main)</span>${same}`
    : markup`${name}${same}`;
}

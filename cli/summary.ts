/**
 * The main job's findings on one screen.
 *
 * @module
 */
import { join } from "node:path";
import { definitionsTried } from "../lib/sweep/verdict_input.ts";
import { reachText } from "./reach_text.ts";
import type { Results, Run } from "../lib/write/results.ts";

/** Warnings beyond these are counted only; the report has them all. */
const WARNINGS_SHOWN = 4;
const WIDTH = 96;

/**
 * Text of at most about 30 lines: verdict, key numbers, what was left out, warnings, where to look.
 *
 * @param bold Marks text as bold where the terminal can.
 */
export function summaryText(
  results: Results,
  folder: string,
  bold: (text: string) => string = (text) => text,
): string {
  const [run] = results.runs;
  return [
    bold(wrapped(results.verdict.headline)),
    "",
    ...results.verdict.sentences.slice(0, 4).map((text) => wrapped(text)),
    "",
    ...keyLines(results, run),
    ...warningLines(results.warnings),
    "",
    `Report  ${join(folder, "report.html")}`,
    `Layer   ${join(folder, "areas.fgb")}`,
  ].join("\n");
}

function keyLines({ layer, sweep }: Results, run: Run): string[] {
  const { neighbors, global, local, rate } = run;
  const { moranI } = global;
  const lines = [
    `Areas      ${layer.used} of ${layer.features} used${leftOutText(layer.leftOut)}`,
    `Neighbors  ${neighbors.rule}: ${neighbors.pairs} pairs, ${
      shortNumber(neighbors.meanNeighbors)
    } ` +
    `on average, ${neighbors.islands} alone`,
    wrapped(reachLine(layer, run), "           "),
    `Moran's I  ${shortNumber(moranI.value)} (expected ${shortNumber(moranI.expected)}), ` +
    `p ${pText(moranI.p)}, ${moranI.permutations} permutations`,
    `Flagged    ${local.significant} of ${local.tested} areas at ${local.level} (${local.adjust})${
      classText(local.counts)
    }`,
  ];
  if (rate) lines.push(wrapped(rateLine(rate, local.level), "           "));
  if (sweep) {
    const { joint, stability } = sweep;
    lines.push(
      `Sweep      ${definitionsTried(sweep)} definitions, I from ${
        shortNumber(joint.smallest)
      } to ` +
        `${shortNumber(joint.largest)}, joint p ${pText(joint.p)}; ` +
        `${stability.flaggedSteady} flagged areas steady`,
    );
  }
  return lines;
}

function reachLine({ metricCrs }: Results["layer"], { neighbors, diagnostics }: Run): string {
  const { components, oneWayLinks, longestLink } = neighbors;
  const { noneAlone, oneComponent } = diagnostics;
  const unit = metricCrs?.unit ?? "m";
  const pieces = `${components} connected ${components === 1 ? "piece" : "pieces"}`;
  const longest = longestLink === null ? "" : `, longest link ${shortNumber(longestLink)} ${unit}`;
  const reach = noneAlone === null || oneComponent === null
    ? ""
    : `; within ${reachText(noneAlone, unit)} no area is alone, within ${
      reachText(oneComponent, unit)
    } the map hangs together`;
  return `Links      ${pieces}, ${oneWayLinks} one-way links${longest}${reach}`;
}

function rateLine(rate: NonNullable<Run["rate"]>, level: number): string {
  const { overdispersion, constantRisk, funnel } = rate;
  const isVaried = overdispersion.p !== null && overdispersion.p <= level;
  return `Rates      ${shortNumber(rate.overall)} per ${rate.per} overall, ${
    isVaried ? "more" : "not more"
  } variable than chance (p ${pText(overdispersion.p)}); I at one risk for all p ${
    pText(constantRisk.p)
  }; ${funnel["above 99.8"]} areas above and ${funnel["below 99.8"]} below the 99.8 % limits`;
}

function leftOutText(leftOut: Results["layer"]["leftOut"]): string {
  const parts = leftOut.map(({ reason, count }) => `${count} ${reason}`);
  return parts.length ? ` (not tested: ${parts.join(", ")})` : "";
}

function classText(counts: Readonly<Record<string, number>>): string {
  const parts = Object.entries(counts)
    .filter(([name, count]) => name.includes(" among ") && count > 0)
    .map(([name, count]) => `${count} ${name}`);
  return parts.length ? `: ${parts.join(", ")}` : "";
}

function warningLines(warnings: readonly string[]): string[] {
  if (warnings.length === 0) return [];
  const rest = warnings.length - WARNINGS_SHOWN;
  const shown = warnings.slice(0, WARNINGS_SHOWN).map((text) => wrapped(`! ${text}`, "  "));
  return ["", ...shown, ...(rest > 0 ? [`! ${rest} more in the report`] : [])];
}

function shortNumber(value: number | null): string {
  return value === null ? "undefined" : String(Number(value.toPrecision(3)));
}

function pText(p: number | null): string {
  if (p === null) return "undefined";
  return p < 0.001 ? "< 0.001" : `= ${Number(p.toPrecision(2))}`;
}

/** Breaks a text at spaces so that no line is longer than {@link WIDTH}. */
function wrapped(text: string, indent = ""): string {
  const lines = [""];
  for (const word of text.split(" ")) {
    const line = lines[lines.length - 1];
    if (line === "") lines[lines.length - 1] = (lines.length > 1 ? indent : "") + word;
    else if (line.length + 1 + word.length <= WIDTH) lines[lines.length - 1] = `${line} ${word}`;
    else lines.push(indent + word);
  }
  return lines.join("\n");
}

/**
 * What a pointer over an area tells.
 *
 * @module
 */
import { isFlagged } from "../write/class_looks.ts";
import { percentText, pText, valueText } from "./number_text.ts";
import { areaName, type ReportInput } from "./report_input.ts";

/** Name, class, value and evidence of an area, a line each. */
export function areaTooltip(input: ReportInput, row: number): string {
  const { areas, results } = input;
  const name = areas.class[row];
  const lines = [areaName(input, row), name];
  const reason = areas.leftOut[row];
  if (reason !== null) return [...lines, reason].join("\n");
  lines.push(`${areas.prefix}: ${valueText(areas.value[row])}`);
  const { level } = results.runs[0].local;
  if (!Number.isNaN(areas.p[row])) {
    lines.push(`p ${pText(areas.p[row], level)}, adjusted ${pText(areas.q[row], level)}`);
  }
  const steady = areas.steady?.[row];
  if (areas.agree && steady && (isFlagged(name) || steady !== "quiet")) {
    lines.push(`${percentText(areas.agree[row])} of definitions agree: ${steady}`);
  }
  return lines.join("\n");
}

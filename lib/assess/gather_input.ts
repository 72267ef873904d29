/**
 * Everything that is read from disk for the main job: the layer, the joined table, their checksums.
 *
 * @module
 */
import type { Layer } from "../layer/layer.ts";
import { compileFilter } from "../prepare/filter.ts";
import { type JoinReport, joinTable } from "../read/join.ts";
import { type RecordedInput, recordInput } from "../read/record_input.ts";
import { readTable, tableColumns } from "../read/table.ts";
import { openSource } from "./open_source.ts";
import type { AssessPlan, JoinPlan } from "./plan.ts";

/** What was read. */
export interface GatheredInput {
  /** The layer, with the table's columns added where one was joined. */
  readonly layer: Layer;
  readonly join: JoinReport | null;
  readonly inputs: readonly RecordedInput[];
  readonly notes: readonly string[];
}

/** Reads the layer and joins the table of a plan. Throws what reading and joining throw. */
export async function gatherInput(plan: AssessPlan): Promise<GatheredInput> {
  const { layer, notes } = await openSource(plan.path, plan.source);
  const inputs = await recordInput("layer", plan.path);
  if (!plan.join) return { layer, join: null, inputs, notes };
  const joined = await joinFile(layer, plan.join, plan);
  return {
    layer: joined.layer,
    join: joined.report,
    inputs: [...inputs, ...await recordInput("table", plan.join.table)],
    notes: [...notes, ...joined.report.notes],
  };
}

async function joinFile(layer: Layer, join: JoinPlan, { source, decimal }: AssessPlan) {
  const { delimiter, encoding, sheet } = source;
  const options = { delimiter, encoding, sheet, decimal: decimal ?? undefined };
  const table = await readTable(join.table, options);
  return joinTable(layer, table, {
    layerKey: join.layerKey,
    tableKey: join.tableKey,
    keep: join.where === null ? undefined : compileFilter(join.where, tableColumns(table)),
  });
}

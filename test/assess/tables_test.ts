/** The main job on a table as an office publishes it: marks, encodings, and several ways to have no number. */
import assert from "node:assert/strict";
import { assess } from "../../lib/assess/assess.ts";
import { writeAssessment } from "../../lib/assess/write_assessment.ts";
import { assertClose } from "../support/close.ts";
import { gridLayer } from "../support/grid_layer.ts";
import { withFolder } from "../support/temp_folder.ts";

const grid = gridLayer({ columns: 6, rows: 6 }, (at) => ({ code: String(at).padStart(4, "0") }));
const numbers = Array.from({ length: 36 }, (_, at) => 1000.25 + 7 * at * at - 30 * at);
/** Row 1 to 6: suppressed, not asked, below five twice, a code of old, nothing. */
const GAPS = ["*", "..", "<5", "<5", "-999", ""];
const cells = numbers.map((number, at) => GAPS[at - 1] ?? german(number));

function german(number: number): string {
  return new Intl.NumberFormat("de-DE", { minimumFractionDigits: 2 }).format(number);
}

/** Windows-1252 for text that stays within Latin-1. */
function latin1(text: string): Uint8Array {
  return Uint8Array.from(text, (letter) => letter.charCodeAt(0));
}

const rows = cells.map((cell, at) => `${String(at).padStart(4, "0")};${cell};Straße ${at}`);
const semicolons = ["code;Größe;Ort", ...rows, ""].join("\r\n");

async function onTable(
  table: Uint8Array | string,
  test: (layer: string, options: { join: string; on: string }, folder: string) => Promise<void>,
): Promise<void> {
  await withFolder(async (folder) => {
    await Deno.writeTextFile(`${folder}/grid.geojson`, grid);
    const bytes = typeof table === "string" ? new TextEncoder().encode(table) : table;
    await Deno.writeFile(`${folder}/t.csv`, bytes);
    await test(`${folder}/grid.geojson`, { join: `${folder}/t.csv`, on: "code" }, folder);
  });
}

const PLAN = {
  ...{ value: "Größe", missingValues: "*,..,<5,-999", sweep: false, localPermutations: 999 },
} as const;
const KINDS = { "*": 1, "..": 1, "<5": 2, "-999": 1, empty: 1 };

for (
  const [what, table] of [
    ["Windows-1252", latin1(semicolons)],
    ["UTF-8 with a byte-order mark", `\ufeff${semicolons}`],
  ] as const
) {
  Deno.test(`assess() reads decimal commas and thousands points in ${what}, and counts each kind of gap`, () =>
    onTable(table, async (layer, join) => {
      const { results, areas } = await assess(layer, { ...PLAN, ...join });
      assert.deepEqual(
        Object.fromEntries(results.missingValues.map(({ kind, count }) => [kind, count])),
        KINDS,
      );
      const used = numbers.filter((_, at) => at === 0 || at > GAPS.length);
      assert.equal(results.layer.used, used.length);
      const { min, max, mean } = results.runs[0].values;
      assert.deepEqual([min, max], [Math.min(...used), Math.max(...used)]);
      assertClose(mean!, used.reduce((sum, value) => sum + value, 0) / used.length, 1e-12);
      assert.equal(areas.leftOut[1], "value missing: *");
      assert.ok(Number.isNaN(areas.z[1]), "suppressed is not zero");
    }));
}

Deno.test("assess() names each kind of missing value in the report", () =>
  onTable(latin1(semicolons), async (layer, join, folder) => {
    const assessment = await assess(layer, { ...PLAN, ...join });
    await writeAssessment(assessment, `${folder}/out`);
    const report = await Deno.readTextFile(`${folder}/out/report.html`);
    for (const kind of ["empty (1 ", "* (1 ", ".. (1 ", "&lt;5 (2 ", "-999 (1 "]) {
      assert.ok(report.includes(kind), kind);
    }
  }));

/** 1.100, 1.101, …: thirty-six numbers just above one, or above a thousand. */
const ambiguous = numbers.map((_, at) => `${String(at).padStart(4, "0")};1.${100 + at}`);

Deno.test("assess() obeys the flags that overrule what it would detect", () =>
  onTable(["code;v", ...ambiguous].join("\n"), async (layer, join) => {
    const plan = { ...PLAN, value: "v", ...join, delimiter: ";", encoding: "utf-8" };
    const point = await assess(layer, { ...plan, decimal: "." });
    assert.equal(point.results.runs[0].values.min, 1.1);
    const thousands = await assess(layer, { ...plan, decimal: ",", thousands: "." });
    assert.equal(thousands.results.runs[0].values.min, 1100);
  }));

import assert from "node:assert/strict";
import { mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { compareOutcomes, differences } from "./compare_results.ts";

Deno.test("differences() lets floats differ by 1e-12 relative and no more", () => {
  assert.deepEqual(differences({ value: 0.25 }, { value: 0.25 * (1 + 9e-13) }), []);
  assert.deepEqual(differences({ value: 0.25 }, { value: 0.25 * (1 + 2e-12) }).length, 1);
});

Deno.test("differences() wants counts, p, text and null to be the same", () => {
  const near = 1 + 2 ** -52;
  assert.equal(differences({ a: { p: 0.5 } }, { a: { p: 0.5 * near } }).length, 1);
  assert.equal(differences([{ rate_q: 0.5 }], [{ rate_q: 0.5 * near }]).length, 1);
  assert.equal(differences({ count: 10 ** 13 }, { count: 10 ** 13 + 1 }).length, 1);
  assert.deepEqual(differences({ runs: [{ class: "alone" }] }, { runs: [{ class: "no value" }] }), [
    'runs.0.class: "alone" against "no value"',
  ]);
  assert.deepEqual(differences({ a: null }, { a: 0.5 }), ["a: null against 0.5"]);
});

Deno.test("differences() tells of members and items that one side lacks", () => {
  assert.deepEqual(differences({ a: 1 }, { a: 1, b: 2 }), ["b: undefined against 2"]);
  assert.deepEqual(differences([1], [1, 2]), ["1: undefined against 2"]);
  assert.equal(differences([], {}).length, 1);
});

Deno.test("compareOutcomes() compares the areas cell by cell", () => {
  const folder = mkdtempSync(join(tmpdir(), "compare-"));
  const write = (name: string, text: string) => writeFileSync(join(folder, name), text);
  try {
    write("results.json", '{"seed": "x"}');
    write("areas.csv", "_row,name,rate_z,rate_p\n0,a,0.1,0.5\n1,b,,\n");
    assert.deepEqual(compareOutcomes(folder, folder), []);
    const other = mkdtempSync(join(folder, "other-"));
    writeFileSync(join(other, "results.json"), '{"seed": "x"}');
    writeFileSync(
      join(other, "areas.csv"),
      "_row,name,rate_z,rate_p\n0,a,0.10000000000000002,0.5\n1,b,,0.5\n",
    );
    assert.deepEqual(compareOutcomes(folder, other), ['1.rate_p: "" against 0.5']);
  } finally {
    rmSync(folder, { recursive: true });
  }
});

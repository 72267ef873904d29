import assert from "node:assert/strict";
import { UsageError } from "../../lib/layer/errors.ts";
import { parseMetricChoice } from "../../lib/project/metric_choice.ts";
import { fault } from "../support/fault.ts";

Deno.test("parseMetricChoice() reads words, codes and proj strings", () => {
  assert.deepEqual(parseMetricChoice(" auto "), { kind: "auto" });
  assert.deepEqual(parseMetricChoice("planar"), { kind: "planar" });
  assert.deepEqual(parseMetricChoice("geodesic"), { kind: "geodesic" });
  assert.deepEqual(parseMetricChoice("esri:102003"), { kind: "code", code: "ESRI:102003" });
  const definition = "+zone=32 +proj=utm";
  assert.deepEqual(parseMetricChoice(definition), { kind: "proj", definition });
});

Deno.test("parseMetricChoice() lists the choices when it knows none", () => {
  for (const text of ["utm", "", "EPSG:", "32632", "proj=utm", "EPSG:32632 x"]) {
    assert.throws(
      () => parseMetricChoice(text),
      fault(UsageError, /choose auto, planar, geodesic/),
    );
  }
});

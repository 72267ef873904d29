import assert from "node:assert/strict";
import { UsageError } from "../../lib/layer/errors.ts";
import { resolveCrs } from "../../lib/read/crs.ts";
import { fault } from "../support/fault.ts";

Deno.test("resolveCrs() knows EPSG codes in any letter case and codes of other authorities", async () => {
  const utm = await resolveCrs(" epsg:32632 ");
  assert.deepEqual([utm.name, utm.code, utm.geographic], [
    "WGS 84 / UTM zone 32N",
    "EPSG:32632",
    false,
  ]);
  assert.match(utm.wkt, /^PROJCRS\["WGS 84 \/ UTM zone 32N"/);
  const nad = await resolveCrs("EPSG:4267");
  assert.deepEqual([nad.name, nad.code, nad.geographic], ["NAD27", "EPSG:4267", true]);
  assert.equal((await resolveCrs("ESRI:102003")).code, "ESRI:102003");
});

Deno.test("resolveCrs() takes PROJ strings and WKT", async () => {
  const proj = "+proj=laea +lat_0=52 +lon_0=10 +datum=WGS84";
  const equalArea = await resolveCrs(proj);
  assert.deepEqual([equalArea.name, equalArea.code, equalArea.geographic], [proj, null, false]);
  const { wkt } = await resolveCrs("EPSG:25832");
  assert.equal((await resolveCrs(wkt)).code, "EPSG:25832");
});

Deno.test("resolveCrs() names what it does not know", async () => {
  for (const text of ["EPSG:99999", "nonsense", "", "+proj=nothing"]) {
    await assert.rejects(
      resolveCrs(text),
      fault(UsageError, new RegExp(`No coordinate reference system "${text.replace("+", "\\+")}"`)),
    );
  }
});

import assert from "node:assert/strict";
import { join } from "node:path";
import { readColumns } from "../../lib/layer/column.ts";
import { decodeLayer } from "../../lib/layer/decode_layer.ts";
import { resolveCrs } from "../../lib/read/crs.ts";
import { linksFgb, type LinksInput } from "../../lib/write/links_layer.ts";
import { readNatively } from "../support/native_gdal.ts";
import { tempFolder } from "../support/temp_folder.ts";

const LINKS: LinksInput = {
  crs: null,
  points: Float64Array.of(0, 0, 3, 4, NaN, NaN, 10, 0),
  links: {
    from: Uint32Array.of(0, 1, 1, 2),
    to: Uint32Array.of(1, 0, 3, 0),
    weight: Float64Array.of(1, 0.5, 0.5, 1),
    distance: Float64Array.of(5, 5, 8.06, NaN),
  },
};

Deno.test("linksFgb() draws what native GDAL reads, by whatever order", async () => {
  using folder = tempFolder();
  const path = join(folder.path, "links.fgb");
  const crs = await resolveCrs("EPSG:25832");
  const ids = ["Ærø", "Łódź", null, "Süd"];
  await Deno.writeFile(path, linksFgb({ ...LINKS, crs, ids }));
  const { types, features, geometryType, text } = await readNatively(path);
  assert.equal(geometryType, "Line String");
  assert.match(text, /ID\["EPSG",25832\]/);
  assert.deepEqual([...types], [
    ["from_row", "Integer"],
    ["to_row", "Integer"],
    ["from", "String"],
    ["to", "String"],
    ["weight", "Real"],
    ["distance", "Real"],
  ]);
  const rows = features.map(({ values, geometry }) => [...values.values(), geometry].join(" "));
  assert.deepEqual(rows.sort(), [
    "0 1 Ærø Łódź 1 5 LINESTRING (0 0,3 4)",
    "1 0 Łódź Ærø 0.5 5 LINESTRING (3 4,0 0)",
    "1 3 Łódź Süd 0.5 8.06 LINESTRING (3 4,10 0)",
    // An area without a point has links, but no lines.
    "2 0 Ærø 1 ",
  ]);
});

Deno.test("linksFgb() leaves out ids and distances where there are none", () => {
  const layer = decodeLayer(linksFgb({ ...LINKS, links: { ...LINKS.links, distance: null } }), "t");
  assert.deepEqual(layer.columns.map(({ name }) => name), ["from_row", "to_row", "weight"]);
  const [from, weight] = readColumns(layer, ["from_row", "weight"]);
  assert.deepEqual(new Set<unknown>(Array.from<unknown>(from.values)), new Set<unknown>([0, 1, 2]));
  assert.equal((weight.values as Float64Array).reduce((sum, value) => sum + value), 3);
});

Deno.test("linksFgb() writes a layer without links", () => {
  const none = new Uint32Array(0), nothing = new Float64Array(0);
  const links = { from: none, to: none, weight: nothing, distance: nothing };
  const layer = decodeLayer(linksFgb({ ...LINKS, links }), "t");
  assert.deepEqual([layer.count, layer.columns.length], [0, 4]);
});

import assert from "node:assert/strict";
import { crsOf, decodeLayer } from "../../lib/layer/decode_layer.ts";
import { type FgbCrs, readFgbHeader } from "../../lib/layer/fgb_header.ts";
import { addSpatialIndex } from "../../lib/write/spatial_index.ts";
import { fgbOf } from "../support/fgb.ts";

const point = (x: number, y: number) => ({ geometry: { type: "Point", coordinates: [x, y] } });
const line = { geometry: { type: "LineString", coordinates: [[0, 0], [1, 1]] } };

Deno.test("decodeLayer() tells what more than half of the features are", () => {
  assert.equal(decodeLayer(fgbOf([point(0, 0), point(1, 1), line]), "t").shape, "point");
  assert.equal(decodeLayer(fgbOf([point(0, 0), line]), "t").shape, "mixed");
  assert.equal(decodeLayer(fgbOf([point(NaN, 0)]), "t").shape, "none");
});

Deno.test("decodeLayer() declares the geometry type where all features have one", () => {
  const typeIn = (fgb: Uint8Array) => readFgbHeader(decodeLayer(fgb, "t").fgb).header.geometryType;
  assert.equal(typeIn(fgbOf([line, line])), 2);
  assert.equal(typeIn(fgbOf([point(0, 0), line])), 0);
});

Deno.test("decodeLayer() leaves out a spatial index and keeps the order of the file", () => {
  const plain = decodeLayer(fgbOf([point(9, 9), point(0, 0), point(5, 5)]), "t");
  const indexed = decodeLayer(addSpatialIndex(plain.fgb, plain.geometry), "t");
  assert.equal(readFgbHeader(indexed.fgb).header.indexNodeSize, 0);
  // Along the curve, which starts at the lower left corner.
  assert.deepEqual([...indexed.geometry.xy], [0, 0, 5, 5, 9, 9]);
  assert.equal(indexed.featureStarts.length, 4);
  assert.equal(indexed.featureStarts[3], indexed.fgb.length);
});

Deno.test("decodeLayer() refuses bytes that end within a feature", () => {
  const fgb = fgbOf([point(0, 0), point(1, 1)]);
  assert.throws(() => decodeLayer(fgb.subarray(0, fgb.length - 8), "t"), RangeError);
});

const stored = (wkt: string, more: Partial<FgbCrs> = {}): FgbCrs => ({
  org: null,
  code: 0,
  name: null,
  description: null,
  wkt,
  codeString: null,
  ...more,
});

Deno.test("crsOf() takes name and code from the header, the name else from the definition", () => {
  assert.deepEqual(crsOf(stored('GEOGCRS["NAD27",DATUM[]]', { org: "EPSG", code: 4267 })), {
    name: "NAD27",
    code: "EPSG:4267",
    wkt: 'GEOGCRS["NAD27",DATUM[]]',
    geographic: true,
  });
  assert.equal(crsOf(stored('PROJCS["mine",GEOGCS["x"]]'))?.code, null);
  assert.equal(
    crsOf(stored('PROJCS["x"]', { org: "IAU", codeString: "30100" }))?.code,
    "IAU:30100",
  );
});

Deno.test("crsOf() tells degrees from plane coordinates, within compound systems too", () => {
  const geographic = (wkt: string) => crsOf(stored(wkt))?.geographic;
  assert.equal(geographic('GEOGCS["a"]'), true);
  assert.equal(geographic('GEODCRS["a"]'), true);
  assert.equal(geographic('PROJCS["a",GEOGCS["b"]]'), false);
  assert.equal(geographic('PROJCRS["a",BASEGEOGCRS["b"]]'), false);
  assert.equal(geographic('COMPD_CS["a + height",GEOGCS["a"],VERT_CS["h"]]'), true);
  assert.equal(geographic('COMPD_CS["a + height",PROJCS["a"],VERT_CS["h"]]'), false);
  assert.equal(geographic('BOUNDCRS[SOURCECRS[GEOGCRS["a"]],TARGETCRS[PROJCRS["b"]]]'), true);
  assert.equal(geographic('BOUNDCRS[SOURCECRS[PROJCRS["a"]],TARGETCRS[GEOGCRS["b"]]]'), false);
});

Deno.test("crsOf() is null where the file says that it does not know", () => {
  assert.equal(crsOf(null), null);
  assert.equal(crsOf(stored("")), null);
  assert.equal(crsOf(stored('GEOGCRS["Undefined geographic SRS"]')), null);
  assert.equal(crsOf(stored('ENGCRS["Undefined Cartesian SRS"]')), null);
  assert.equal(crsOf(stored('PROJCS["unknown"]')), null);
  assert.equal(crsOf(stored('LOCAL_CS["Nonearth",UNIT["Meter",1]]')), null);
});

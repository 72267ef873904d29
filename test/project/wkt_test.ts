import assert from "node:assert/strict";
import { readWkt } from "../../lib/project/wkt.ts";

const BASE = 'GEOGCRS["ED50",DATUM["ED50",ELLIPSOID["International 1924",6378388,297]]]';

Deno.test("readWkt() takes the horizontal system out of a compound or bound one", () => {
  assert.equal(readWkt(`COMPOUNDCRS["both",${BASE},VERTCRS["height",CS[vertical,1]]]`).wkt, BASE);
  assert.equal(readWkt(`BOUNDCRS[SOURCECRS[${BASE}],TARGETCRS[GEOGCRS["WGS 84"]]]`).wkt, BASE);
  assert.equal(readWkt(BASE).wkt, BASE);
});

Deno.test("readWkt() is not misled by brackets in names", () => {
  const odd = 'PROJCRS["a ] strange [ name",BASEGEOGCRS["x"]]';
  assert.equal(readWkt(`COMPOUNDCRS["c",${odd},VERTCRS["h"]]`).wkt, odd);
});

Deno.test("readWkt() reads the prime meridian in the unit it is written in", () => {
  assert.equal(readWkt(BASE).primeMeridian, 0);
  assert.equal(readWkt('GEOGCS["NTF",PRIMEM["Paris",2.33722917]]').primeMeridian, 2.33722917);
  const grads =
    'GEOGCRS["NTF",PRIMEM["Paris", 2.5969213,\n  ANGLEUNIT["grad",0.0157079632679489]]]';
  assert.ok(Math.abs(readWkt(grads).primeMeridian - 2.33722917) < 1e-9);
});

Deno.test("readWkt() tells south-oriented grids from those that only name north first", () => {
  const axes = (first: string, second: string) =>
    readWkt(`PROJCRS["g",AXIS["a",${first},ORDER[1]],AXIS["b",${second},ORDER[2]]]`).layout;
  assert.equal(axes("east", "north"), "east north");
  assert.equal(axes("north", "east"), "east north");
  assert.equal(axes("west", "south"), "west south");
  assert.equal(axes("south", "west"), "south west");
  assert.equal(axes("south", "south"), "east north"); // polar: both axes point away from the north pole
  assert.equal(readWkt('PROJCS["g",AXIS["X",SOUTH],AXIS["Y",WEST]]').layout, "south west");
});

Deno.test("readWkt() rewords the method of a system, not its name", () => {
  const { wkt } = readWkt(
    'PROJCRS["World Equidistant Cylindrical",METHOD["Equidistant Cylindrical"],' +
      'PARAMETER["Latitude of 1st standard parallel",60]]',
  );
  assert.equal(
    wkt,
    'PROJCRS["World Equidistant Cylindrical",METHOD["eqc"],PARAMETER["lat_ts",60]]',
  );
});

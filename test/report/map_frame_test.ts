import assert from "node:assert/strict";
import type { FlatGeometry } from "../../lib/layer/geometry.ts";
import type { Crs } from "../../lib/layer/layer.ts";
import { fitMap, UNITS } from "../../lib/report/map_frame.ts";
import { assertClose } from "../support/close.ts";

const ROOM = () => ({ width: 400, height: 300 });
const DEGREES: Crs = {
  name: "WGS 84",
  code: "EPSG:4326",
  wkt: "+proj=longlat +datum=WGS84 +no_defs",
  geographic: true,
};

function pointsAt(...places: (readonly [number, number])[]): FlatGeometry {
  const starts = Uint32Array.from({ length: places.length + 1 }, (_, i) => i);
  return {
    kinds: new Uint8Array(places.length).fill(1),
    partStarts: starts,
    ringStarts: starts,
    vertexStarts: starts,
    xy: Float64Array.from(places.flat()),
  };
}

Deno.test("fitMap() fits the layer into the room with north up", () => {
  const frame = fitMap({ geometry: pointsAt([100, 50], [300, 150]), crs: null }, ROOM)!;
  assert.deepEqual([frame.width, frame.height], [400, 200]);
  assert.deepEqual([frame.across(100), frame.down(150)], [0, 0]);
  assert.deepEqual([frame.across(300), frame.down(50)], [400 * UNITS, 200 * UNITS]);
  assert.equal(frame.metersPerUnit, null);
});

Deno.test("fitMap() shortens degrees of longitude by the cosine of the middle latitude", () => {
  // 2° × 1° around 60° N is a square, and 1° of latitude is 111.195 km.
  const geometry = pointsAt([10, 59.5], [12, 60.5]);
  const frame = fitMap({ geometry, crs: DEGREES }, () => ({ width: 300, height: 300 }))!;
  assertClose(frame.width, 300);
  assertClose(frame.height, 300);
  assertClose(frame.metersPerUnit!, 111_195 / 300);
});

Deno.test("fitMap() measures the middle of a projected layer, not its units", () => {
  // Web Mercator at 60° N: one unit of the layer is half a meter on the ground (cos 60°).
  const north = 8_399_737.9;
  const crs: Crs = { name: "m", code: "EPSG:3857", wkt: WEB_MERCATOR, geographic: false };
  const geometry = pointsAt([1e6, north - 5e3], [1e6 + 1e4, north + 5e3]);
  const frame = fitMap({ geometry, crs }, () => ({ width: 100, height: 100 }))!;
  assertClose(frame.metersPerUnit!, 0.5 * 1e4 / 100, 0.005);
});

const WEB_MERCATOR = "+proj=merc +a=6378137 +b=6378137 +lat_ts=0 +lon_0=0 +x_0=0 +y_0=0 +k=1 " +
  "+units=m +nadgrids=@null +no_defs";

Deno.test("fitMap() draws areas on both sides of the 180th meridian side by side", () => {
  const frame = fitMap({ geometry: pointsAt([178, 0], [-179, 1]), crs: DEGREES }, ROOM)!;
  const [west, east] = [frame.geometry.xy[0], frame.geometry.xy[2]];
  assert.deepEqual([west, east], [178, 181]);
  assert.equal(frame.across(west), 0);
});

Deno.test("fitMap() gives a single place some room, and an empty layer none", () => {
  const frame = fitMap({ geometry: pointsAt([5, 5]), crs: null }, ROOM)!;
  assert.deepEqual([frame.width, frame.height], [300, 300]);
  assert.equal(frame.across(5), 150 * UNITS);
  assert.equal(fitMap({ geometry: pointsAt(), crs: null }, ROOM), null);
});

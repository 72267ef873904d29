import assert from "node:assert/strict";
import { join } from "node:path";
import { readColumn } from "../../lib/layer/column.ts";
import { decodeLayer } from "../../lib/layer/decode_layer.ts";
import { readFgbHeader } from "../../lib/layer/fgb_header.ts";
import { addSpatialIndex, buildSpatialIndex } from "../../lib/write/spatial_index.ts";
import { fgbOf } from "../support/fgb.ts";
import { readNatively } from "../support/native_gdal.ts";
import { tempFolder } from "../support/temp_folder.ts";

/** Points on a grid in an order that has nothing to do with their place. */
function scattered(count: number): Uint8Array {
  return fgbOf(Array.from({ length: count }, (_, i) => {
    const cell = (i * 7919) % count;
    const side = Math.ceil(Math.sqrt(count));
    const coordinates = [cell % side, Math.floor(cell / side)];
    return { geometry: { type: "Point", coordinates }, properties: { row: i } };
  }));
}

function indexed(fgb: Uint8Array): Uint8Array {
  const { fgb: plain, geometry } = decodeLayer(fgb, "t");
  return addSpatialIndex(plain, geometry);
}

Deno.test("addSpatialIndex() lets native GDAL find the same features as without index", async () => {
  using folder = tempFolder();
  // One leaf; a full root; a second level just begun; three levels.
  for (const count of [1, 16, 17, 1000]) {
    const path = join(folder.path, `${count}.fgb`);
    await Deno.writeFile(path, indexed(scattered(count)));
    const all = await readNatively(path);
    assert.equal(all.features.length, count);
    const part = await readNatively(path, "-spat", "2.5", "1.5", "6.5", "4.5");
    const expected = all.features.filter(({ geometry }) => {
      const [, x, y] = /\((\d+) (\d+)\)/.exec(geometry ?? "")?.map(Number) ?? [];
      return x > 2 && x < 7 && y > 1 && y < 5;
    });
    assert.deepEqual(part.features, expected);
  }
});

Deno.test("addSpatialIndex() keeps every row with its own values", () => {
  const before = decodeLayer(scattered(500), "t");
  const after = decodeLayer(indexed(before.fgb), "t");
  const rows = readColumn(after, "row").values as Float64Array;
  assert.deepEqual(new Set(rows), new Set(readColumn(before, "row").values as Float64Array));
  rows.forEach((row, i) => {
    assert.deepEqual(
      after.geometry.xy.slice(2 * i, 2 * i + 2),
      before.geometry.xy.slice(2 * row, 2 * row + 2),
    );
  });
});

Deno.test("addSpatialIndex() keeps features without geometry, which other writers drop", async () => {
  using folder = tempFolder();
  const points = [[0, 0], [NaN, NaN], [5, 5]];
  const fgb = fgbOf(
    points.map((coordinates, row) => ({
      geometry: { type: "Point", coordinates },
      properties: { row },
    })),
  );
  const path = join(folder.path, "holes.fgb");
  await Deno.writeFile(path, indexed(fgb));
  const rows = (await readNatively(path)).features.map(({ values }) => values.get("row"));
  assert.deepEqual(rows.sort(), ["0", "1", "2"]);
});

Deno.test("addSpatialIndex() returns a file without geometry as it is", () => {
  const layer = decodeLayer(fgbOf([{ geometry: { type: "Point", coordinates: [NaN, 0] } }]), "t");
  assert.equal(addSpatialIndex(layer.fgb, layer.geometry), layer.fgb);
});

Deno.test("addSpatialIndex() says in the header what it did, and does it again the same", () => {
  const file = indexed(scattered(100));
  const { header } = readFgbHeader(file);
  assert.deepEqual([header.indexNodeSize, header.featuresCount], [16, 100]);
  assert.deepEqual(header.envelope, [0, 0, 9, 9]);
  assert.deepEqual(indexed(scattered(100)), file);
  assert.deepEqual(indexed(file), file);
});

Deno.test("buildSpatialIndex() follows a Hilbert curve: neighbors in order are neighbors in place", () => {
  const { geometry } = decodeLayer(scattered(1024), "t");
  const { order } = buildSpatialIndex(geometry, new Float64Array(1024).fill(8))!;
  // On a square of 2^5 cells each step goes to a cell beside the last.
  for (let i = 1; i < order.length; i++) {
    const step = [0, 1].map((k) =>
      geometry.xy[2 * order[i] + k] - geometry.xy[2 * order[i - 1] + k]
    );
    assert.equal(Math.abs(step[0]) + Math.abs(step[1]), 1, `step ${i}`);
  }
});

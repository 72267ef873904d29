import assert from "node:assert/strict";
import { UnreadableError } from "../../lib/layer/errors.ts";
import { loadGdal } from "../../lib/read/gdal.ts";
import { GdalError, GdalFolder } from "../../lib/read/gdal_folder.ts";
import { fault } from "../support/fault.ts";

const bytesOf = (text: string) => new TextEncoder().encode(text);
const POINT = bytesOf(`{"type":"Point","coordinates":[1,2]}`);

Deno.test("loadGdal() loads one instance, from any working folder", async () => {
  const before = Deno.cwd();
  Deno.chdir("/");
  try {
    const [one, two] = await Promise.all([loadGdal(), loadGdal()]);
    assert.equal(one, two);
    assert.ok(one.drivers().some(({ driver, reads }) => driver === "GPKG" && reads));
  } finally {
    Deno.chdir(before);
  }
});

Deno.test("GdalFolder keeps its files apart from other folders and takes them along when it goes", async () => {
  const gdal = await loadGdal();
  using outer = new GdalFolder(gdal);
  outer.put("a.2023.geojson", POINT);
  outer.put("a.2024.geojson", bytesOf(`{"type":"Point","coordinates":[3,4]}`));
  {
    using inner = new GdalFolder(gdal);
    inner.put("deep/b.geojson", POINT);
    assert.deepEqual(inner.files("").map(({ name }) => name), ["deep/b.geojson"]);
    assert.throws(() => inner.open("a.2023.geojson"), GdalError);
  }
  const layers = ["a.2023.geojson", "a.2024.geojson"].map((name) => {
    const { layers } = outer.info(outer.open(name), []) as { layers: { name: string }[] };
    return layers[0].name;
  });
  assert.deepEqual(layers, ["a.2023", "a.2024"]);
});

Deno.test("GdalFolder.translate() gives GDAL's reason, without paths of its memory", async () => {
  using folder = new GdalFolder(await loadGdal());
  folder.put("p.geojson", POINT);
  const dataset = folder.open("p.geojson");
  const to = (driver: string) => () => folder.translate(dataset, "out", { args: ["-f", driver] });
  assert.throws(to("No such driver"), (error) => {
    assert.ok(error instanceof GdalError);
    assert.match(error.message, /No such driver/);
    assert.doesNotMatch(error.message, /nearkin/);
    return true;
  });
  assert.throws(() => folder.open("nowhere.geojson"), GdalError);
});

Deno.test("loadGdal() starts another instance after a crash", async () => {
  const gdal = await loadGdal();
  // No dataset lies at this address.
  const crash = () => gdal.call("GDALDatasetGetLayerCount", 0x7fffffff);
  assert.throws(crash, fault(UnreadableError, /GDAL broke off/));
  assert.ok(gdal.broken);
  const next = await loadGdal();
  assert.notEqual(next, gdal);
  using folder = new GdalFolder(next);
  folder.put("p.geojson", POINT);
  assert.notEqual(folder.open("p.geojson"), 0);
});

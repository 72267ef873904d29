import assert from "node:assert/strict";
import { listFormats, WRITABLE_FORMATS } from "../../lib/read/formats.ts";

Deno.test("listFormats() begins with the everyday formats under the names one types", async () => {
  const formats = await listFormats();
  assert.deepEqual(
    formats.filter(({ group }) => group === "everyday").map(({ name }) => name),
    formats.slice(0, 14).map(({ name }) => name),
  );
  assert.deepEqual(formats[0], {
    name: "fgb",
    title: "FlatGeobuf",
    extensions: ["fgb"],
    read: true,
    write: true,
    group: "everyday",
  });
  assert.ok(formats.find(({ name }) => name === "geojsonl")?.extensions.includes("ndjson"));
});

Deno.test("listFormats() tells which formats can be written", async () => {
  const formats = await listFormats();
  const writable = formats.filter(({ write }) => write).map(({ name }) => name);
  // MapInfo's text form is written by the driver of `tab`.
  assert.deepEqual(writable, WRITABLE_FORMATS.filter((name) => name !== "mif"));
  assert.equal(formats.find(({ name }) => name === "topojson")?.write, false);
});

Deno.test("listFormats() lists no format twice and each with a title", async () => {
  const formats = await listFormats();
  assert.equal(new Set(formats.map(({ name }) => name)).size, formats.length);
  assert.ok(formats.every(({ title, read }) => title !== "" && read));
});

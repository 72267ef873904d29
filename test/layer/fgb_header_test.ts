import assert from "node:assert/strict";
import {
  encodeFgbHeader,
  type FgbHeader,
  looksLikeFgb,
  newFgbColumn,
  readFgbHeader,
} from "../../lib/layer/fgb_header.ts";
import { fgbOf } from "../support/fgb.ts";

const full: FgbHeader = {
  name: "Ærø",
  envelope: [-1.5, 0, 2, 1e9],
  geometryType: 6,
  hasZ: true,
  hasM: false,
  hasT: true,
  hasTm: true,
  columns: [
    newFgbColumn("中文", 11),
    {
      name: "code",
      type: 5,
      title: "Code",
      description: "What it is",
      width: 9,
      precision: 4,
      scale: 2,
      nullable: false,
      unique: true,
      primaryKey: true,
      metadata: "{}",
    },
  ],
  featuresCount: 12,
  indexNodeSize: 0,
  crs: {
    org: "EPSG",
    code: 32632,
    name: "UTM",
    description: "d",
    wkt: "PROJCRS[]",
    codeString: "32632",
  },
  title: "A title",
  description: "A description",
  metadata: '{"a":1}',
};

Deno.test("encodeFgbHeader() and readFgbHeader() keep everything a header can hold", () => {
  const bytes = encodeFgbHeader(full);
  assert.deepEqual(readFgbHeader(bytes), { header: full, featuresAt: bytes.length });
});

Deno.test("encodeFgbHeader() writes a bare header", () => {
  const bare: FgbHeader = {
    ...full,
    name: "",
    envelope: null,
    columns: [],
    crs: null,
    title: null,
    description: null,
    metadata: null,
  };
  assert.deepEqual(readFgbHeader(encodeFgbHeader(bare)).header, bare);
});

Deno.test("looksLikeFgb() knows the magic bytes, whatever the patch version", () => {
  const bytes = fgbOf([{ geometry: { type: "Point", coordinates: [0, 0] } }]);
  assert.ok(looksLikeFgb(bytes));
  assert.ok(looksLikeFgb(encodeFgbHeader(full)));
  assert.ok(!looksLikeFgb(bytes.with(3, 2)));
  assert.ok(!looksLikeFgb(bytes.subarray(0, 10)));
  assert.ok(!looksLikeFgb(new TextEncoder().encode("fgb is short for FlatGeobuf")));
});

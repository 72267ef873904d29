/** Every fault a user can make: exit code, the thing named, and the remedy. */
import assert from "node:assert/strict";
import { gridLayer } from "../support/grid_layer.ts";
import { runCli } from "../support/run_cli.ts";
import { withFolder } from "../support/temp_folder.ts";

/** A 3 × 3 layer: rate 0 to 8, flat all equal, text with one odd cell. */
const grid = gridLayer({ columns: 3, rows: 3 }, (at) => ({
  code: `A${at}`,
  rate: at,
  flat: 1,
  noted: at === 4 ? "n/k" : String(at),
  sparse: at < 2 ? at : null,
  people: 100 + at,
  half: at + 0.5,
  below: at - 1,
  none: 0,
}));

interface Fault {
  readonly when: string;
  /** Files to make: name to text. */
  readonly files?: Readonly<Record<string, string>>;
  /** Arguments behind `assess`; `@` stands for the folder. */
  readonly args: readonly string[];
  readonly code: number;
  readonly says: RegExp;
}

const LAYER = ["@/grid.geojson"];
const OUT = ["--out", "@/out"];

const FAULTS: readonly Fault[] = [
  {
    when: "there is no such file",
    args: ["@/absent.gpkg", "--value", "rate", ...OUT],
    code: 3,
    says: /absent\.gpkg.*no such file/i,
  },
  {
    when: "the file is no vector file",
    files: { "letter.docx": "Dear colleague" },
    args: ["@/letter.docx", "--value", "rate", ...OUT],
    code: 3,
    says: /letter\.docx.*formats/,
  },
  {
    when: "the layer is empty",
    files: { "empty.geojson": '{"type":"FeatureCollection","features":[]}' },
    args: ["@/empty.geojson", "--value", "rate", ...OUT],
    code: 4,
    says: /empty\.geojson has no features/,
  },
  {
    when: "the field does not exist",
    args: [...LAYER, "--value", "rat", ...OUT],
    code: 2,
    says: /"?rat"?.*did you mean "rate"/,
  },
  {
    when: "a text stands in the numeric field",
    args: [...LAYER, "--value", "noted", ...OUT],
    code: 4,
    says: /noted.*grid\.geojson.*row.*n\/k.*--missing-values/,
  },
  {
    when: "all values are equal",
    args: [...LAYER, "--value", "flat", ...OUT],
    code: 4,
    says: /flat.*grid\.geojson.*9 values are equal \(1\)/,
  },
  {
    when: "fewer than three areas can be used",
    args: [...LAYER, "--value", "sparse", ...OUT],
    code: 4,
    says: /sparse.*grid\.geojson.*2 of its 9 areas.*left out: 7 value missing.*at least 3/,
  },
  {
    when: "--value-where selects no area",
    args: [...LAYER, "--value", "rate", "--value-where", "rate > 100", ...OUT],
    code: 4,
    says: /rate.*grid\.geojson.*"rate > 100" selects none of the 9 areas.*wider/,
  },
  {
    when: "a distance rule meets a layer without CRS",
    files: {
      "loose.csv": "x,y,rate\n0,0,1\n1,0,2\n0,1,3\n1,1,5\n2,1,8\n",
    },
    args: ["@/loose.csv", "--value", "rate", "--neighbors", "nearest:2", ...OUT],
    code: 4,
    says: /loose.*no coordinate reference system.*--metric planar/,
  },
  {
    when: "the CRS is unknown",
    args: [...LAYER, "--value", "rate", "--metric", "EPSG:999999", ...OUT],
    code: 2,
    says: /No coordinate reference system "EPSG:999999".*EPSG:4326/,
  },
  {
    when: "nearest asks for as many areas as there are",
    args: [...LAYER, "--value", "rate", "--neighbors", "nearest:9", ...OUT],
    code: 4,
    says: /Cannot link 9 nearest neighbors as the layer has only 9 usable areas/,
  },
  {
    when: "a band has no width",
    args: [...LAYER, "--value", "rate", "--neighbors", "within:0km", ...OUT],
    code: 2,
    says: /"0km".*more than 0/,
  },
  {
    when: "a rule is misspelled",
    args: [...LAYER, "--value", "rate", "--neighbors", "toching", ...OUT],
    code: 2,
    says: /touching/,
  },
  {
    when: "a band leaves everybody alone",
    args: [...LAYER, "--value", "rate", "--neighbors", "within:10m", ...OUT],
    code: 4,
    says: /rate.*no area has a neighbor under within:10m/,
  },
  {
    when: "permutations are too few",
    args: [...LAYER, "--value", "rate", "--permutations", "50", ...OUT],
    code: 2,
    says: /--permutations 50.*99 to 9999999/,
  },
  {
    when: "an adjustment is unknown",
    args: [...LAYER, "--value", "rate", "--adjust", "sidak", ...OUT],
    code: 2,
    says: /--adjust sidak.*bonferroni, holm, bh, by/,
  },
  {
    when: "an option is unknown",
    args: [...LAYER, "--value", "rate", "--colour", "red", ...OUT],
    code: 2,
    says: /--colour/,
  },
  {
    when: "a required option is missing",
    args: [...LAYER, "--value", "rate"],
    code: 2,
    says: /--out/,
  },
  {
    when: "a format to write is unknown",
    args: [...LAYER, "--value", "rate", "--no-sweep", "--also", "gpkgg", ...OUT],
    code: 2,
    says: /gpkgg.*gpkg/,
  },
  {
    when: "the outcome exists",
    files: { "out/record.json": "{}" },
    args: [...LAYER, "--value", "rate", ...OUT],
    code: 5,
    says: /out .*already there; add --force/,
  },
  {
    when: "the outcome would replace other files",
    files: { "out/holiday.jpg": "" },
    args: [...LAYER, "--value", "rate", "--force", ...OUT],
    code: 5,
    says: /out .*holiday\.jpg/,
  },
  {
    when: "a file stands where the outcome should go",
    files: { "out": "" },
    args: [...LAYER, "--value", "rate", ...OUT],
    code: 5,
    says: /out .*a file stands in the way/,
  },
  {
    when: "the table has a key twice",
    files: { "long.csv": "code,year,n\nA0,2020,1\nA0,2021,2\nA1,2020,3\nA1,2021,5\n" },
    args: [...LAYER, "--join", "@/long.csv", "--on", "code", "--value", "n", ...OUT],
    code: 4,
    says: /long\.csv.*A0.*--join-where "?'?year/s,
  },
  {
    when: "no key of the table matches",
    files: { "other.csv": "code,n\na0,1\na1,2\na2,4\n" },
    args: [...LAYER, "--join", "@/other.csv", "--on", "code", "--value", "n", ...OUT],
    code: 4,
    says: /other\.csv.*case/s,
  },
  {
    when: "a join has no key",
    files: { "other.csv": "code,n\nA0,1\n" },
    args: [...LAYER, "--join", "@/other.csv", "--value", "n", ...OUT],
    code: 2,
    says: /other\.csv without --on KEY/,
  },
  {
    when: "neither a value nor a rate is given",
    args: [...LAYER, ...OUT],
    code: 2,
    says: /--value FIELD, or --rate CASES\/POPULATION/,
  },
  {
    when: "both a value and a rate are given",
    args: [...LAYER, "--value", "rate", "--rate", "rate/people", ...OUT],
    code: 2,
    says: /both --value rate and --rate rate\/people/,
  },
  {
    when: "the population field of a rate does not exist",
    args: [...LAYER, "--rate", "rate/peopel", ...OUT],
    code: 2,
    says: /"peopel".*did you mean "people"/,
  },
  {
    when: "counts are not whole",
    args: [...LAYER, "--rate", "half/people", ...OUT],
    code: 4,
    says: /half.*row 1 .*0\.5.*whole/,
  },
  {
    when: "a population is negative",
    args: [...LAYER, "--rate", "rate/below", ...OUT],
    code: 4,
    says: /below.*row 1 .*-1.*0 or more/,
  },
  {
    when: "a share has more cases than population",
    args: [...LAYER, "--rate", "people/rate", "--share", ...OUT],
    code: 4,
    says: /row 1 .*100 cases \(people\) in a population of 0 \(rate\)/,
  },
  {
    when: "all populations are zero",
    args: [...LAYER, "--rate", "rate/none", ...OUT],
    code: 4,
    says: /rate\/none.*grid\.geojson.*0 of its 9 areas/,
  },
  {
    when: "a rate has no cases anywhere",
    args: [...LAYER, "--rate", "none/people", ...OUT],
    code: 4,
    says: /none\/people.*none of its 9 areas has any cases/,
  },
  {
    when: "a value has no logarithm",
    args: [...LAYER, "--value", "rate", "--transform", "log", ...OUT],
    code: 4,
    says: /--transform log.*above 0.*row 1 \(_row 0\) of field rate holds 0/,
  },
  {
    when: "a filter cannot be read",
    args: [...LAYER, "--value", "rate", "--where", "rate >", ...OUT],
    code: 2,
    says: /\^/,
  },
];

for (const fault of FAULTS) {
  Deno.test(`assess exits with ${fault.code} when ${fault.when}`, () =>
    withFolder(async (folder) => {
      const files = { "grid.geojson": grid, ...fault.files };
      for (const [name, text] of Object.entries(files)) {
        if (name.includes("/")) await Deno.mkdir(`${folder}/${name.split("/")[0]}`);
        await Deno.writeTextFile(`${folder}/${name}`, text);
      }
      const before = Array.from(Deno.readDirSync(folder), ({ name }) => name).sort();
      const args = fault.args.map((arg) => arg.replaceAll("@/", `${folder}/`));
      const { code, stdout, stderr } = await runCli("assess", ...args);
      assert.match(stderr, fault.says);
      assert.equal(code, fault.code, stderr);
      assert.equal(stdout, "");
      const after = Array.from(Deno.readDirSync(folder), ({ name }) => name).sort();
      assert.deepEqual(after, before, "nothing is left behind");
    }));
}

Deno.test("assess names the layers when there are several and none is chosen", () =>
  withFolder(async (folder) => {
    const topology = {
      type: "Topology",
      arcs: [[[0, 0], [1, 0], [1, 1], [0, 1], [0, 0]]],
      objects: {
        north: { type: "GeometryCollection", geometries: [{ type: "Polygon", arcs: [[0]] }] },
        south: { type: "GeometryCollection", geometries: [{ type: "Polygon", arcs: [[0]] }] },
      },
    };
    await Deno.writeTextFile(`${folder}/two.topojson`, JSON.stringify(topology));
    const { code, stderr } = await runCli(
      ...["assess", `${folder}/two.topojson`, "--value", "n", "--out", `${folder}/out`],
    );
    assert.equal(code, 3);
    assert.match(stderr, /two\.topojson holds 2 layers \(north, south\); choose one with --layer/);
  }));

Deno.test("assess exits with 5 when the folder above the outcome is no folder", () =>
  withFolder(async (folder) => {
    await Deno.writeTextFile(`${folder}/grid.geojson`, grid);
    await Deno.writeTextFile(`${folder}/file`, "");
    const { code, stderr } = await runCli(
      ...["assess", `${folder}/grid.geojson`, "--value", "rate", "--out", `${folder}/file/out`],
    );
    assert.equal(code, 5, stderr);
    assert.match(stderr, /a file stands in the way/);
  }));

/** The main job on small maps: who counts, who does not, and what is kept of them. */
import assert from "node:assert/strict";
import { assess } from "../../lib/assess/assess.ts";
import { writeAssessment } from "../../lib/assess/write_assessment.ts";
import { readLayer } from "../../lib/read/vector.ts";
import { assertClose } from "../support/close.ts";
import { gridLayer } from "../support/grid_layer.ts";
import { withFolder } from "../support/temp_folder.ts";

/** A 5 × 5 grid whose value is its column; `half` is west or east. */
const grid = gridLayer({ columns: 5, rows: 5 }, (at) => ({
  id: `A${at}`,
  rate: at % 5 + (at === 12 ? 0.5 : 0),
  half: at % 5 < 3 ? "west" : "east",
}));

const FEW = { sweep: false, localPermutations: 999 } as const;

async function onGrid(test: (path: string) => Promise<void>, text = grid): Promise<void> {
  await withFolder(async (folder) => {
    await Deno.writeTextFile(`${folder}/grid.geojson`, text);
    await test(`${folder}/grid.geojson`);
  });
}

Deno.test("assess() keeps areas outside of --where as rows with the reason", () =>
  onGrid(async (path) => {
    const { results, areas } = await assess(path, {
      ...FEW,
      value: "rate",
      where: "half = 'west'",
    });
    assert.equal(results.layer.features, 25);
    assert.equal(results.layer.used, 15);
    assert.deepEqual(results.layer.leftOut, [{ reason: "not selected by --where", count: 10 }]);
    assert.equal(areas.leftOut[3], "not selected by --where");
    assert.equal(areas.class[3], "no value");
    assert.ok(Number.isNaN(areas.z[3]));
    // Column 3 touches column 4: 5 pairs side by side and 8 across corners.
    assert.ok(results.warnings.some((text) => text.includes("cut 13 neighbor pairs")));
  }));

Deno.test("assess() with --value-where tests a subset on the whole map's neighbors", () =>
  onGrid(async (path) => {
    const all = await assess(path, { ...FEW, value: "rate" });
    const some = await assess(path, { ...FEW, value: "rate", valueWhere: "half = 'west'" });
    assert.equal(some.results.runs[0].global.moranI.value, all.results.runs[0].global.moranI.value);
    assert.equal(some.results.runs[0].local.tested, 15);
    assert.equal(some.areas.i[2], all.areas.i[2], "its eastern neighbors still count");
    assert.equal(some.areas.p[2], all.areas.p[2]);
    assert.ok(Number.isNaN(some.areas.p[3]));
    assert.equal(some.areas.class[3], "no value");
    assert.equal(some.areas.leftOut[3], "not selected by --value-where");
  }));

Deno.test("assess() leaves areas without geometry or value out and keeps their rows", () => {
  const text = gridLayer(
    { columns: 5, rows: 5 },
    (at) => ({ rate: at === 7 ? null : at === 8 ? -999 : at * at % 11 }),
    (feature, at) => at === 24 ? { ...feature, geometry: null } : feature,
  );
  return onGrid(async (path) => {
    const { results, areas } = await assess(path, { ...FEW, value: "rate", missingValues: "-999" });
    assert.equal(results.layer.used, 22);
    assert.deepEqual(results.layer.leftOut.map(({ count }) => count), [1, 1, 1]);
    assert.equal(areas.leftOut[24], "no geometry");
    assert.equal(areas.leftOut[7], "value missing");
    assert.match(areas.leftOut[8]!, /-999/);
    assert.deepEqual(results.missingValues.map(({ kind }) => kind), ["null", "-999"]);
  }, text);
});

Deno.test("assess() gives an island no p and the class alone, but keeps it in the mean", () => {
  const text = gridLayer({ columns: 4, rows: 2 }, (at) => ({ rate: at }), (feature, at) => {
    const far = [[[9e5, 5e6], [9.01e5, 5e6], [9.01e5, 5.001e6], [9e5, 5e6]]];
    return at === 7 ? { ...feature, geometry: { type: "Polygon", coordinates: far } } : feature;
  });
  return onGrid(async (path) => {
    const { results, areas } = await assess(path, { ...FEW, value: "rate" });
    assert.equal(results.runs[0].neighbors.islands, 1);
    assert.equal(results.runs[0].values.mean, 3.5);
    assert.equal(areas.class[7], "alone");
    assert.equal(areas.quad[7], null);
    for (const values of [areas.p, areas.q, areas.i, areas.lag]) assert.ok(Number.isNaN(values[7]));
    assertClose(areas.z[7], 3.5 / Math.sqrt(5.25), 1e-12); // population variance of 0..7 is 63/12
  }, text);
});

Deno.test("assess() merges nothing away: every definition tried is counted in the sweep", () =>
  onGrid(async (path) => {
    const { results } = await assess(path, {
      ...{ value: "rate", vary: ["touching, edge", "nearest:3..5"], localPermutations: 9_999 },
    });
    const { definitions } = results.sweep!;
    const tried = definitions.flatMap(({ rule, sameAs }) => [rule, ...sameAs]);
    assert.deepEqual(tried.sort(), ["edge", "nearest:3", "nearest:4", "nearest:5", "touching"]);
    assert.equal(definitions[0].main, true);
  }));

Deno.test("assess() stops when its signal is aborted", () =>
  onGrid(async (path) => {
    const signal = AbortSignal.abort();
    await assert.rejects(assess(path, { value: "rate", signal }), { name: "AbortError" });
  }));

Deno.test("assess() hands a CRS that the caller gave on to the written layer", () =>
  withFolder(async (folder) => {
    const rows = Array.from({ length: 12 }, (_, at) => `${at % 4},${at % 3},${at}`);
    await Deno.writeTextFile(`${folder}/places.csv`, ["x,y,n", ...rows].join("\n"));
    const assessment = await assess(`${folder}/places.csv`, {
      ...{ value: "n", crs: "EPSG:25832", neighbors: "nearest:3", sweep: false },
    });
    await writeAssessment(assessment, `${folder}/out`);
    const { crs } = await readLayer(`${folder}/out/areas.fgb`);
    assert.equal(crs?.code, "EPSG:25832");
  }));

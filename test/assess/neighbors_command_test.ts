/** `nearkin neighbors` and the weights of the main job, from the command line to the numbers. */
import assert from "node:assert/strict";
import { assess } from "../../lib/assess/assess.ts";
import { buildLinks } from "../../lib/assess/build_links.ts";
import { writeLinks } from "../../lib/assess/write_links.ts";
import { UnfitDataError, UsageError } from "../../lib/layer/errors.ts";
import { runCli } from "../support/run_cli.ts";
import { withFolder } from "../support/temp_folder.ts";

const NC = new URL("../../testdata/data/nc.gpkg", import.meta.url).pathname;
/** Few draws: these tests are about links and weights. */
const FEW = { value: "SID79", sweep: false, localPermutations: 99, permutations: 99 } as const;

for (const ending of ["csv", "fgb", "gpkg", "geojsonl", "sqlite"]) {
  for (const id of ["NAME", undefined]) {
    const named = id === undefined ? "row numbers" : "names";
    Deno.test(`links written as ${ending} with ${named} read back bit for bit`, () =>
      withFolder(async (folder) => {
        const rule = { neighbors: "nearest:5", weights: "inverse:1" };
        const built = await buildLinks(NC, { ...rule, id });
        const [file] = await writeLinks(built, `${folder}/links.${ending}`);
        const neighbors = `links:"${file}"`;
        const again = await buildLinks(NC, {
          neighbors,
          id,
          weights: "given",
          standardize: "none",
        });
        assert.deepEqual(again.links.from, built.links.from);
        assert.deepEqual(again.links.to, built.links.to);
        assert.deepEqual(again.links.weight, built.links.weight);
      }));
  }
}

Deno.test("writeLinks() refuses an ending that no format has", async () => {
  const built = await buildLinks(NC, {});
  await assert.rejects(writeLinks(built, "links.abc"), UsageError);
});

for (
  const [weights, standardize] of [
    ["boundary", "row"],
    ["inverse:2", "none"],
    ["gaussian:40km", "total"],
    ["exponential:25mi", "variance"],
    ["bisquare:k8", "row"],
    ["triangular:60km", "none"],
    ["epanechnikov:k12", "total"],
  ] as const
) {
  Deno.test(`assess takes --weights ${weights} --standardize ${standardize}`, () =>
    withFolder(async (folder) => {
      const { code, stdout, stderr } = await runCli(
        ...["assess", NC, "--value", "SID79", "--weights", weights, "--standardize", standardize],
        ...["--no-sweep", "--local-permutations", "99", "--permutations", "99"],
        ...["--out", `${folder}/out`, "--json"],
      );
      assert.equal(code, 0, stderr);
      const [run] = JSON.parse(stdout).runs;
      assert.deepEqual([run.weights, run.standardize], [weights, standardize]);
      assert.ok(run.global.moranI.value > 0);
    }));
}

Deno.test("boundary weights are the shares of the shared boundary", async () => {
  // The sum of w_ij d over a row is 1, and each share is longer for a longer common boundary: Currituck, an
  // island county, shares 3 boundaries at most.
  const { links } = await buildLinks(NC, { weights: "boundary", id: "NAME" });
  const rowSums = new Map<number, number>();
  links.from.forEach((row, k) => rowSums.set(row, (rowSums.get(row) ?? 0) + links.weight[k]));
  for (const sum of rowSums.values()) assert.ok(Math.abs(sum - 1) < 1e-12);
  // Unscaled lengths are the same from both sides.
  const { links: meters } = await buildLinks(NC, { weights: "boundary", standardize: "none" });
  const length = new Map(
    [...meters.from].map((from, k) => [`${from} ${meters.to[k]}`, meters.weight[k]]),
  );
  for (const [pair, weight] of length) {
    const back = length.get(pair.split(" ").reverse().join(" "))!;
    assert.ok(Math.abs(weight - back) <= 1e-9 * weight && weight > 1 && weight < 2e5, pair);
  }
});

Deno.test("geodesic distances are close to projected ones where these are true, and never planar degrees", async () => {
  const rule = { neighbors: "nearest:4", weights: "inverse:1" };
  const [earth, plane] = await Promise.all(
    ["geodesic", "EPSG:32617"].map((metric) => buildLinks(NC, { ...rule, metric })),
  );
  assert.equal(earth.unit, "m");
  const ratio = earth.diagnostics.oneComponent! / plane.diagnostics.oneComponent!;
  assert.ok(Math.abs(ratio - 1) < 0.005, String(ratio));
  const shared = earth.links.distance!.map((d, k) => d / plane.links.distance![k]);
  const near = shared.filter((quotient) => Math.abs(quotient - 1) < 0.005);
  assert.ok(near.length > 0.9 * shared.length);
});

Deno.test("a graph on the ellipsoid is refused with the remedy", async () => {
  const graph = { ...FEW, metric: "geodesic", neighbors: "gabriel" };
  await assert.rejects(
    assess(NC, graph),
    (error: Error) => error instanceof UsageError && /--metric/.test(error.message),
  );
});

Deno.test("a band that leaves areas alone says the distance that would not", async () => {
  const { results } = await assess(NC, { ...FEW, neighbors: "within:30km" });
  const text = results.warnings.find((warning) => /leaves no area alone/.test(warning))!;
  const [, wide] = /(within:[\d.]+km)/.exec(text)!;
  const again = await assess(NC, { ...FEW, neighbors: wide });
  assert.ok(results.runs[0].neighbors.islands > 0);
  assert.equal(again.results.runs[0].neighbors.islands, 0);
});

/** Three squares in meters: 0 and 1 share a side, 2 lies 4 cm east of 1 and crosses itself in a second part. */
const SQUARES = [
  "MULTIPOLYGON(((0 0,100 0,100 100,0 100,0 0)))",
  "MULTIPOLYGON(((100 0,200 0,200 100,100 100,100 0)))",
  "MULTIPOLYGON(((200.04 0,300 0,300 100,200.04 100,200.04 0)),((400 0,410 10,410 0,400 10,400 0)))",
];

Deno.test("near misses and rings that cross themselves are told in every place, and snap joins them", () =>
  withFolder(async (folder) => {
    const layer = `${folder}/squares.csv`;
    const rows = SQUARES.map((wkt, i) => `S${i},${i * i},"${wkt}"`);
    await Deno.writeTextFile(layer, ["id,v,wkt", ...rows].join("\n"));
    const source = { crs: "EPSG:32632", id: "id" };
    const built = await buildLinks(layer, source);
    assert.equal(built.summary.pairs, 1);
    const { boundaries, selfCrossing } = built.diagnostics;
    assert.deepEqual([boundaries!.nearMisses, selfCrossing], [1, 1]);
    assert.ok(Math.abs(boundaries!.widestGap! - 0.04) < 1e-9);
    const warning = built.warnings.find((text) => /snap/.test(text))!;
    const [, rule] = /(touching snap=[\d.]+m)/.exec(warning)!;
    const joined = await buildLinks(layer, { ...source, neighbors: rule });
    assert.equal(joined.summary.pairs, 2);
    assert.equal(joined.diagnostics.boundaries!.nearMisses, 0);
    assert.equal(joined.diagnostics.boundaries!.snappedPairs, 1);
    const { stdout } = await runCli("inspect", layer, "--crs", "EPSG:32632");
    assert.match(stdout, /Boundaries 1 pair of areas lies within .* touching snap=/);
    assert.match(stdout, /1 crosses itself/);
    // The same in feet: the gap is 4 cm of another unit.
    const feet = await buildLinks(layer, { ...source, crs: "EPSG:2264" });
    assert.ok(Math.abs(feet.diagnostics.boundaries!.widestGap! - 0.04 * 1200 / 3937) < 1e-9);
  }));

Deno.test("areas at one place are counted, and have no inverse weight", () =>
  withFolder(async (folder) => {
    const layer = `${folder}/points.csv`;
    await Deno.writeTextFile(layer, "id,v,x,y\na,1,0,0\nb,2,5,5\nc,3,5,5\nd,4,9,1\n");
    const source = { crs: "EPSG:32632", id: "id", neighbors: "nearest:2" };
    const built = await buildLinks(layer, source);
    assert.equal(built.diagnostics.sharingPlaces, 2);
    await assert.rejects(
      buildLinks(layer, { ...source, weights: "inverse:1" }),
      (error: Error) =>
        error instanceof UnfitDataError && /areas b and c .*same place/.test(error.message),
    );
  }));

Deno.test("a negative weight is refused by the row of its file", () =>
  withFolder(async (folder) => {
    const table = `${folder}/links.csv`;
    await Deno.writeTextFile(table, "from,to,weight\n0,1,2\n1,2,-0.5\n");
    await assert.rejects(
      buildLinks(NC, { neighbors: `links:"${table}"`, weights: "given" }),
      (error: Error) =>
        error instanceof UnfitDataError && /-0\.5 in row 2 of links\.csv/.test(error.message),
    );
  }));

Deno.test("distance is measured between the points that --points names", () =>
  withFolder(async (folder) => {
    const layer = `${folder}/squares.csv`;
    // The seats of S0 and S2 lie 30 m apart, that of S1 is 4 km away.
    const seats = ["0,0", "0,4000", "30,0"];
    const rows = SQUARES.map((wkt, i) => `S${i},${seats[i]},"${wkt}"`);
    await Deno.writeTextFile(layer, ["id,east,north,wkt", ...rows].join("\n"));
    const source = { crs: "EPSG:32632", id: "id", neighbors: "nearest:1" };
    const { links } = await buildLinks(layer, {
      ...source,
      points: "east,north",
      metric: "planar",
    });
    assert.deepEqual([...links.to], [2, 0, 0]);
    assert.deepEqual([...links.distance!], [30, 4000, 30]);
    await assert.rejects(buildLinks(layer, { ...source, points: "east" }), UsageError);
    await assert.rejects(buildLinks(layer, { ...source, points: "id,north" }), UsageError);
  }));

Deno.test("a link given twice with different weights is refused by the names of its areas", () =>
  withFolder(async (folder) => {
    const table = `${folder}/links.csv`;
    await Deno.writeTextFile(table, "from,to,weight\nAshe,Surry,2\nAshe,Surry,3\n");
    await assert.rejects(
      buildLinks(NC, { neighbors: `links:"${table}"`, id: "NAME" }),
      /from area Ashe to area Surry .*twice/,
    );
  }));

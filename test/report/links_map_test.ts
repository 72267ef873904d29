import assert from "node:assert/strict";
import { linksMap } from "../../lib/report/links_map.ts";
import { reportSample } from "../support/report_sample.ts";

const input = reportSample({ columns: 6, rows: 5, bends: 1 });
const { places } = input.links!;

/** Data of the path with a stroke of that color. */
function pathsOf(svg: string): string[] {
  return [...svg.matchAll(/<path d="([^"]*)"/g)].map(([, data]) => data);
}

function withLinks(from: readonly number[], to: readonly number[]) {
  const links = { from: Uint32Array.from(from), to: Uint32Array.from(to), places };
  return { ...input, links };
}

Deno.test("linksMap() draws each pair once, whichever way its links go", () => {
  const bothWays = linksMap(withLinks([0, 1, 1, 7], [1, 0, 7, 1]))!.markup;
  assert.match(bothWays, /aria-label="Map of 2 pairs of neighbors"/);
  assert.equal(pathsOf(bothWays)[1].match(/m/g)?.length, 2);
  // 1 chose 0, not the other way around.
  const oneWay = linksMap(withLinks([1, 1], [0, 7]))!.markup;
  assert.equal(pathsOf(oneWay)[1].match(/m/g)?.length, 2);
});

Deno.test("linksMap() draws an even sample of very many pairs, and says so", () => {
  const from = Array.from({ length: 50_000 }, (_, at) => at % 200);
  const to = from.map((_, at) => 200 + Math.floor(at / 200));
  const many = new Float64Array(2 * 450).map((_, at) => places[at % 40]);
  const links = { from: Uint32Array.from(from), to: Uint32Array.from(to), places: many };
  const svg = linksMap({
    ...input,
    geometry: {
      kinds: new Uint8Array(450).fill(1),
      partStarts: Uint32Array.from({ length: 451 }, (_, i) => i),
      ringStarts: Uint32Array.from({ length: 451 }, (_, i) => i),
      vertexStarts: Uint32Array.from({ length: 451 }, (_, i) => i),
      xy: many,
    },
    links,
  })!.markup;
  assert.match(svg, /20,000 of 50,000 pairs are drawn/);
  assert.equal(pathsOf(svg)[1].match(/m/g)?.length, 20_000);
  assert.ok(svg.length < 400_000);
});

Deno.test("linksMap() draws a pair across the 180th meridian on one side of the map", () => {
  const geographic = { name: "WGS 84", code: "EPSG:4326", wkt: "", geographic: true };
  const xy = Float64Array.of(179, 0, -179, 0, 178, 5);
  const starts = Uint32Array.of(0, 1, 2, 3);
  const svg = linksMap({
    ...input,
    crs: geographic,
    geometry: {
      kinds: Uint8Array.of(1, 1, 1),
      partStarts: starts,
      ringStarts: starts,
      vertexStarts: starts,
      xy,
    },
    links: { from: Uint32Array.of(0), to: Uint32Array.of(1), places: xy },
  })!.markup;
  const [, , dx] = /^m(\d+) \d+ ?(-?\d+)/.exec(pathsOf(svg)[1])!;
  // 2 of the 3 degrees that the map is wide (5 high: it is 840 units wide at most).
  assert.ok(Number(dx) > 0 && Number(dx) < 840, dx);
});

Deno.test("linksMap() draws nothing without links", () => {
  assert.equal(linksMap(withLinks([], [])), null);
  assert.equal(linksMap({ ...input, links: null }), null);
});

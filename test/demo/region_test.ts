import assert from "node:assert/strict";
import { type InventedRegion, inventedRegion, shuffledTwin } from "../../lib/demo/region.ts";
import { type Ring, signedArea } from "../../lib/demo/outline.ts";

const region = inventedRegion();
const rings = region.geojson.features.map((f) => f.geometry.coordinates.flat());

/** Areas by the border vertices they own, as the text of each vertex. */
function vertexOwners(): Map<string, Set<number>> {
  const owners = new Map<string, Set<number>>();
  rings.forEach((ringsOfArea, area) => {
    for (const vertex of ringsOfArea.flat()) {
      const key = vertex.join(" ");
      if (!owners.has(key)) owners.set(key, new Set());
      owners.get(key)!.add(area);
    }
  });
  return owners;
}

/** Neighbors by shared vertices, the obvious slow way, from the published coordinates alone. */
function touching(): number[][] {
  const sets = rings.map(() => new Set<number>());
  for (const owners of vertexOwners().values()) {
    for (const a of owners) for (const b of owners) if (a !== b) sets[a].add(b);
  }
  return sets.map((set) => [...set]);
}
const neighbors = touching();

Deno.test("inventedRegion() makes 400 areas in meters with unique codes and invented names", () => {
  const { features, crs } = region.geojson;
  assert.equal(features.length, 400);
  assert.equal(crs.properties.name, "urn:ogc:def:crs:EPSG::25829");
  const codes = features.map((f) => f.properties.code);
  assert.deepEqual(codes, [...codes].sort());
  assert.equal(new Set(codes).size, 400);
  assert.ok(codes.every((code) => /^\d{4}$/.test(code)) && codes[0] === "0017");
  const names = features.map((f) => f.properties.name);
  assert.equal(new Set(names).size, 400);
  // deno-lint-ignore no-control-regex
  assert.ok(names.filter((name) => /[^\x00-\x7f]/.test(name)).length > 100);
});

Deno.test("inventedRegion() gives the same text for the same seed and another for another", () => {
  const again = inventedRegion();
  assert.equal(JSON.stringify(again), JSON.stringify(region));
  const other = inventedRegion({ seed: "other" });
  assert.notEqual(JSON.stringify(other.geojson), JSON.stringify(region.geojson));
  assert.equal(other.geojson.features.length, 400);
});

Deno.test("inventedRegion() gives neighbors the very same border vertices", () => {
  // Every side of a ring is either coast or runs the other way in exactly one other area.
  const sides = new Map<string, number>();
  const seen = (key: string) => sides.set(key, (sides.get(key) ?? 0) + 1);
  for (const ring of rings.flat()) {
    for (let i = 1; i < ring.length; i++) seen([...ring[i - 1], ...ring[i]].join(" "));
  }
  let shared = 0;
  for (const [side, times] of sides) {
    assert.equal(times, 1, `side ${side} is used twice in one sense`);
    const [ax, ay, bx, by] = side.split(" ");
    if (sides.has([bx, by, ax, ay].join(" "))) shared++;
  }
  assert.ok(shared > 0.6 * sides.size, `${shared} of ${sides.size} sides are shared`);
});

Deno.test("inventedRegion() draws simple rings, outer ones counterclockwise", () => {
  for (const feature of region.geojson.features) {
    for (const [outer, ...holes] of feature.geometry.coordinates) {
      assert.ok(signedArea(outer) > 0);
      for (const hole of holes) assert.ok(signedArea(hole) < 0);
      for (const ring of [outer, ...holes]) assert.ok(isSimple(ring), feature.properties.code);
    }
  }
});

Deno.test("inventedRegion() has islands without neighbors, parts and holes", () => {
  assert.equal(neighbors.filter((list) => list.length === 0).length, 5);
  const parts = region.geojson.features.map((f) => f.geometry.coordinates);
  assert.equal(parts.filter((list) => list.length > 1).length, 4);
  assert.ok(parts.some((list) => list.some((part) => part.length > 1)));
  // Seven islands and the mainland hang together in themselves only.
  assert.equal(pieces(neighbors), 8);
});

Deno.test("inventedRegion() has small and large populations and both kinds of missing values", () => {
  const dwellings = region.areas.map((area) => area.dwellings);
  assert.ok(Math.min(...dwellings) >= 60 && Math.min(...dwellings) < 120);
  assert.ok(Math.max(...dwellings) <= 60_000 && Math.max(...dwellings) > 20_000);
  const marks = (mark: string | null) => region.areas.filter((area) => area.mark === mark);
  assert.equal(marks("..").length, 9);
  assert.ok(marks("*").length >= 3 && marks("*").length <= 30);
  assert.ok(marks(null).every(({ damp }) => damp === 0 || damp! >= 10));
});

Deno.test("inventedRegion() publishes the table with semicolons and a decimal comma", () => {
  const [header, ...rows] = region.table.trimEnd().split("\r\n").map((line) => line.split(";"));
  assert.deepEqual(header, ["code", "name", "dwellings", "damp", "damp_rate"]);
  assert.deepEqual(rows.map(([code]) => code), region.areas.map((area) => area.code));
  for (const [, , dwellings, damp, rate] of rows) {
    if (damp === "*" || damp === "..") assert.equal(rate, damp);
    else {
      assert.match(rate, /^\d+,\d$/);
      const exact = 1000 * Number(damp) / Number(dwellings);
      assert.ok(Math.abs(Number(rate.replace(",", ".")) - exact) <= 0.05 + 1e-9);
    }
  }
});

Deno.test("inventedRegion() plants clusters that hang together around one outlier each", () => {
  const at = new Map(region.areas.map((area, i) => [area.code, i]));
  const { high, low, highAmongLow: [inLow], lowAmongHigh: [inHigh] } = region.planted;
  assert.ok(high.length >= 12 && low.length >= 12);
  for (const [cluster, outlier] of [[high, inHigh], [low, inLow]] as const) {
    const members = new Set([...cluster, outlier].map((code) => at.get(code)!));
    const around = neighbors[at.get(outlier)!];
    assert.ok(around.length >= 4 && around.every((area) => members.has(area)));
  }
});

Deno.test("inventedRegion() plants findings that a plain permutation test sees", () => {
  const found = plainFindings(region);
  const share = (codes: readonly string[], kind: string) =>
    codes.filter((code) => found.get(code) === kind).length / codes.length;
  const { planted } = region;
  assert.ok(share(planted.high, "HH") >= 0.9);
  assert.ok(share(planted.low, "LL") >= 0.9);
  assert.equal(share(planted.highAmongLow, "HL"), 1);
  assert.equal(share(planted.lowAmongHigh, "LH"), 1);
});

Deno.test("shuffledTwin() keeps every figure but leaves no finding", () => {
  const before = JSON.stringify(region);
  const twin = shuffledTwin(region);
  assert.equal(JSON.stringify(region), before);
  assert.equal(twin.geojson, region.geojson);
  const figures = ({ areas }: InventedRegion) =>
    areas.map((a) => `${a.dwellings} ${a.damp} ${a.mark}`).sort();
  assert.deepEqual(figures(twin), figures(region));
  assert.deepEqual(twin.areas.map((a) => a.code), region.areas.map((a) => a.code));
  assert.equal(plainFindings(twin).size, 0);
});

/** Whether no two sides of a ring meet but where they follow each other. */
function isSimple(ring: Ring): boolean {
  const turn = ([ax, ay]: Ring[0], [bx, by]: Ring[0], [cx, cy]: Ring[0]) =>
    Math.sign((bx - ax) * (cy - ay) - (by - ay) * (cx - ax));
  const last = ring.length - 1;
  for (let i = 0; i < last; i++) {
    for (let j = i + 2; j < last; j++) {
      if (i === 0 && j === last - 1) continue;
      const [a, b, c, d] = [ring[i], ring[i + 1], ring[j], ring[j + 1]];
      if (turn(a, b, c) !== turn(a, b, d) && turn(c, d, a) !== turn(c, d, b)) return false;
    }
  }
  return true;
}

/** Number of connected pieces of a graph. */
function pieces(graph: readonly (readonly number[])[]): number {
  const seen = new Set<number>();
  let count = 0;
  for (let start = 0; start < graph.length; start++) {
    if (seen.has(start)) continue;
    count++;
    const stack = [start];
    while (stack.length > 0) {
      const at = stack.pop()!;
      if (seen.has(at)) continue;
      seen.add(at);
      stack.push(...graph[at]);
    }
  }
  return count;
}

/**
 * Quadrants of the areas whose mean of neighbors is extreme among 20,000 random draws of as many other
 * areas, with the false-discovery rate of Benjamini & Hochberg held at 0.05. One table of draws for
 * each number of neighbors, and draws may hold the area itself: plain, slightly off, and independent of lib/.
 */
function plainFindings({ areas }: InventedRegion): Map<string, string> {
  const rate = areas.map(({ damp, dwellings }) => damp === null ? NaN : damp / dwellings);
  const usable = rate.filter((value) => !Number.isNaN(value));
  const mean = usable.reduce((sum, value) => sum + value, 0) / usable.length;
  let state = 1;
  const random = () => (state = (state * 48271) % 2147483647) / 2147483647;
  const tables = new Map<number, number[]>();
  const drawsOf = (k: number) => {
    if (!tables.has(k)) {
      const one = () => {
        let sum = 0;
        for (let j = 0; j < k; j++) sum += usable[Math.floor(random() * usable.length)];
        return sum / k;
      };
      tables.set(k, Array.from({ length: 20_000 }, one));
    }
    return tables.get(k)!;
  };
  const tested = areas.flatMap(({ code }, area) => {
    const around = neighbors[area].map((j) => rate[j]).filter((value) => !Number.isNaN(value));
    if (Number.isNaN(rate[area]) || around.length === 0) return [];
    const lag = around.reduce((sum, value) => sum + value, 0) / around.length;
    const draws = drawsOf(around.length);
    const above = draws.filter((value) => value >= lag).length;
    const tail = Math.min(above, draws.length - above);
    const kind = (rate[area] > mean ? "H" : "L") + (lag > mean ? "H" : "L");
    return [{ code, kind, p: Math.min(1, 2 * (tail + 1) / (draws.length + 1)) }];
  }).sort((a, b) => a.p - b.p);
  const last = tested.findLastIndex(({ p }, i) => p <= 0.05 * (i + 1) / tested.length);
  return new Map(tested.slice(0, last + 1).map(({ code, kind }) => [code, kind]));
}

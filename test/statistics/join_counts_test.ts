import assert from "node:assert/strict";
import { UnfitDataError } from "../../lib/layer/errors.ts";
import { type JoinCounts, joinCounts } from "../../lib/statistics/join_counts.ts";
import { momentsOf, ordersOf } from "../support/all_orders.ts";
import { assertClose } from "../support/close.ts";
import { chainWeights, completeWeights, gridWeights } from "../support/maps.ts";
import {
  referenceCase,
  referenceText,
  weightsOfListFile,
  weightsOfMatrix,
} from "../support/reference.ts";

/** The count of two classes, by the first letters the cases use. */
function pairOf({ pairs }: JoinCounts, a: string, b: string) {
  return pairs.find(({ classes }) => classes[0] === a && classes[1] === b)!;
}

const CASE_PAIRS = { BB: ["black", "black"], WW: ["white", "white"], BW: ["black", "white"] };

function blackAndWhite(isBlack: readonly boolean[]): string[] {
  return isBlack.map((black) => black ? "black" : "white");
}

function linksOfEdges(n: number, edges: readonly (readonly [number, number])[]) {
  const matrix = Array.from({ length: n }, () => new Array<number>(n).fill(0));
  for (const [i, j] of edges) matrix[i][j] = matrix[j][i] = 1;
  return weightsOfMatrix(matrix);
}

Deno.test("joinCounts() has the counts and moments worked by hand when four areas stand in a row", () => {
  const found = joinCounts(["a", "a", "b", "b"], chainWeights(4));
  assert.deepEqual(found.classes, [{ name: "a", areas: 2 }, { name: "b", areas: 2 }]);
  assert.equal(found.joins, 3);
  // Of the 6 ways to place two a's, 3 have them side by side: count 1 or 0 at even odds.
  const within = pairOf(found, "a", "a");
  assert.equal(within.joins, 1);
  assertClose(within.nonfree.expected, 1 / 2, 1e-14);
  assertClose(within.nonfree.variance, 1 / 4, 1e-14);
  assertClose(within.nonfree.z, 1, 1e-14);
  // aabb abab abba baab baba bbaa have 1 3 2 2 3 1 joins of a with b: mean 2, variance 4/6.
  const between = pairOf(found, "a", "b");
  assert.equal(between.joins, 1);
  assertClose(between.nonfree.expected, 2, 1e-14);
  assertClose(between.nonfree.variance, 4 / 6, 1e-14);
  // A fair coin for each area: each of the 3 joins mixed with chance 1/2, independently.
  assertClose(between.free.expected, 3 / 2, 1e-14);
  assertClose(between.free.variance, 3 / 4, 1e-14);
});

// Source: joins-enum-*.json, every coloring counted one by one.
Deno.test("joinCounts() has the exact moments when all colorings are counted", () => {
  for (const map of ["grid2x4_rook", "grid3x3_queen", "grid3x4_rook", "island7"]) {
    const { inputs, expected } = referenceCase(`joins-enum-${map}`);
    const links = linksOfEdges(inputs.n, inputs.edges);
    const classes = blackAndWhite(
      Array.from({ length: inputs.n }, (_, i) => inputs.black.includes(i)),
    );
    for (const [name, [a, b]] of Object.entries(CASE_PAIRS)) {
      const nonfree = pairOf(joinCounts(classes, links), a, b);
      assert.equal(nonfree.joins, expected.observed[name]);
      assertClose(nonfree.nonfree.expected, expected.nonfree[name].mean, 1e-10);
      assertClose(nonfree.nonfree.variance, expected.nonfree[name].variance, 1e-10);
      for (const coloring of expected.free) {
        const probabilities = { black: coloring.p_black, white: 1 - coloring.p_black };
        const { free } = pairOf(joinCounts(classes, links, { probabilities }), a, b);
        assertClose(free.expected, coloring[name].mean, 1e-10);
        assertClose(free.variance, coloring[name].variance, 1e-10);
      }
    }
  }
});

// Source: hopkins-joins-open.json; data of Hopkins 1965, burnt savanna, herb remains in 32 x 32 quadrats.
Deno.test("joinCounts() has the counts and moments of dense matrices when the map is a savanna", () => {
  const { inputs, expected } = referenceCase("hopkins-joins-open");
  const rows = referenceText("hopkins_savanna_40x40.csv").trim().split("\n")
    .slice(...inputs.rows).map((line) => line.split(",").map(Number).slice(...inputs.cols));
  const classes = blackAndWhite(rows.flat().map((remains) => remains > 0));
  for (const [contiguity, corners] of [["rook", false], ["queen", true]] as const) {
    const found = joinCounts(classes, gridWeights(32, 32, { corners }));
    assert.equal(found.classes[0].areas, expected.n_black);
    for (const [name, [a, b]] of Object.entries(CASE_PAIRS)) {
      const { joins, nonfree } = pairOf(found, a, b);
      assert.equal(joins, expected[contiguity][name]);
      assertClose(nonfree.expected, expected[contiguity][`E_${name}`], 1e-9);
      assertClose(nonfree.variance, expected[contiguity][`var_${name}`], 1e-9);
      assertClose(nonfree.z, expected[contiguity].z[name], 1e-9);
    }
  }
});

// Source: osullivan-unwin-6x6-joins.json; O'Sullivan & Unwin, ch. 7 (values from memory), recomputed.
Deno.test("joinCounts() has the published free moments when a 6 x 6 grid is colored by a fair coin", () => {
  const { expected } = referenceCase("osullivan-unwin-6x6-joins");
  const classes = blackAndWhite(Array.from({ length: 36 }, (_, i) => i % 5 === 0));
  const probabilities = { black: 0.5, white: 0.5 };
  const found = joinCounts(classes, gridWeights(6, 6), { probabilities });
  assert.equal(found.joins, expected.joins);
  for (const [name, [a, b]] of Object.entries(CASE_PAIRS)) {
    assertClose(pairOf(found, a, b).free.expected, expected[`E_${name}`], 1e-9);
    assertClose(pairOf(found, a, b).free.variance, expected[`var_${name}`], 1e-9);
  }
});

// Source: moran-1948-fixed-P.json; formula of Moran 1948 on the 26 Irish counties.
Deno.test("joinCounts() has the moments of Moran 1948 when some Irish counties are black", () => {
  const links = weightsOfListFile("eire_neighbours_cliff_ord.json");
  for (const { P, mean_BB, var_BB } of referenceCase("moran-1948-fixed-P").expected) {
    const classes = blackAndWhite(Array.from({ length: 26 }, (_, i) => i < P));
    const { nonfree } = pairOf(joinCounts(classes, links), "black", "black");
    assertClose(nonfree.expected, mean_BB, 1e-10);
    assertClose(nonfree.variance, var_BB, 1e-10);
  }
});

// Source: checkerboard.json and half-and-half-torus.json, closed forms.
Deno.test("joinCounts() has the closed form when the map is a checkerboard or half and half", () => {
  const assertJoins = (found: JoinCounts, wanted: Record<string, number>) => {
    for (const [name, [a, b]] of Object.entries(CASE_PAIRS)) {
      assert.equal(pairOf(found, a, b).joins, wanted[name]);
    }
  };
  for (
    const { rows, cols, contiguity, torus, ...wanted } of referenceCase("checkerboard").expected
  ) {
    const isBlack = Array.from(
      { length: rows * cols },
      (_, i) => (Math.floor(i / cols) + i % cols) % 2 === 1,
    );
    const links = gridWeights(rows, cols, { torus, corners: contiguity !== "shared edge" });
    assertJoins(joinCounts(blackAndWhite(isBlack), links), wanted);
  }
  for (const { m, J } of referenceCase("half-and-half-torus").expected) {
    const isBlack = Array.from({ length: m * m }, (_, i) => i % m < m / 2);
    assertJoins(joinCounts(blackAndWhite(isBlack), gridWeights(m, m, { torus: true })), J);
  }
});

Deno.test("joinCounts() has the exact moments of all orders when there are three classes", () => {
  const classes = ["a", "a", "a", "b", "b", "c", "c"];
  const links = linksOfEdges(7, [[0, 1], [0, 2], [1, 2], [2, 3], [3, 4], [4, 5]]);
  const found = joinCounts(classes, links);
  const orders = [...ordersOf(classes.map((_, i) => i))].map((order) =>
    joinCounts(order.map((i) => classes[i]), links)
  );
  found.pairs.forEach(({ nonfree }, at) => {
    const slow = momentsOf(orders.map(({ pairs }) => pairs[at].joins));
    assertClose(nonfree.expected, slow.mean, 1e-10);
    assertClose(nonfree.variance, slow.variance, 1e-10);
  });
  assert.equal(found.pairs.reduce((sum, { joins }) => sum + joins, 0), found.joins);
});

Deno.test("joinCounts() counts a pair once when its link goes one way only", () => {
  const upward = weightsOfMatrix([[0, 1, 0], [0, 0, 1], [0, 1, 0]]);
  const downward = weightsOfMatrix([[0, 0, 0], [1, 0, 1], [0, 1, 0]]);
  const bothWays = joinCounts(["x", "y", "x"], chainWeights(3));
  assert.equal(bothWays.joins, 2);
  assert.equal(pairOf(bothWays, "x", "y").joins, 2);
  assert.deepEqual(joinCounts(["x", "y", "x"], upward), bothWays);
  assert.deepEqual(joinCounts(["x", "y", "x"], downward), bothWays);
});

Deno.test("joinCounts() has no z within a class of one member, and one for its joins with others", () => {
  const found = joinCounts(["lone", "rest", "rest", "rest"], chainWeights(4));
  const within = pairOf(found, "lone", "lone");
  assert.deepEqual([within.joins, within.nonfree.expected, within.nonfree.variance], [0, 0, 0]);
  assert.ok(Number.isNaN(within.nonfree.z));
  // At an end (half of the places) it has 1 join, else 2.
  const { nonfree } = pairOf(found, "lone", "rest");
  assertClose(nonfree.expected, 1.5, 1e-14);
  assertClose(nonfree.variance, 0.25, 1e-14);
});

Deno.test("joinCounts() has a variance of exactly 0 when everybody is everybody's neighbor", () => {
  const classes = Array.from({ length: 9 }, (_, i) => "abc"[i % 3]);
  for (const { joins, nonfree } of joinCounts(classes, completeWeights(9)).pairs) {
    assertClose(joins, nonfree.expected, 1e-12);
    assert.equal(nonfree.variance, 0);
    assert.ok(Number.isNaN(nonfree.z));
  }
});

Deno.test("joinCounts() refuses one class, more than 50 classes, no links and odd probabilities", () => {
  const unfit = (message: RegExp) => (error: unknown) =>
    error instanceof UnfitDataError && message.test(error.message);
  assert.throws(() => joinCounts(["a", "a", "a"], chainWeights(3)), unfit(/1 class as it takes/));
  const many = Array.from({ length: 51 }, (_, i) => `class ${i}`);
  assert.throws(() => joinCounts(many, chainWeights(51)), unfit(/51 classes as at most 50/));
  assert.equal(joinCounts(many.slice(1), chainWeights(50)).pairs.length, 50 * 51 / 2);
  assert.throws(
    () => joinCounts(["a", "b"], { offsets: new Uint32Array(3), indices: new Uint32Array(0) }),
    unfit(/no area has a neighbor/),
  );
  assert.throws(() => joinCounts(["a"], chainWeights(3)), RangeError);
  const chances = (a: number, b: number) => () =>
    joinCounts(["a", "b"], chainWeights(2), { probabilities: { a, b } });
  assert.throws(chances(0.7, 0.7), /a 0.7, b 0.7; each has to be above 0/);
  assert.throws(chances(0, 1), RangeError);
});

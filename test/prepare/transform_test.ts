import assert from "node:assert/strict";
import { UnfitDataError } from "../../lib/layer/errors.ts";
import { freemanTukey } from "../../lib/prepare/freeman_tukey.ts";
import { normalQuantile, normalScores } from "../../lib/prepare/normal_scores.ts";
import { ranks } from "../../lib/prepare/ranks.ts";
import { roundDigits } from "../../lib/prepare/round_digits.ts";
import { type Transform, transformValues } from "../../lib/prepare/transform.ts";
import { assertClose } from "../support/close.ts";

const nameOf = (at: number) => `row ${at}`;

Deno.test("transformValues() gives each transform's numbers with 13 digits", () => {
  const of = (transform: Transform, ...values: number[]) => [
    ...transformValues(Float64Array.from(values), transform, { nameOf }),
  ];
  assert.deepEqual(of("none", 0.1 + 0.2), [0.1 + 0.2]);
  // Logarithms from tables: ln 2 = 0.69314718055994…, ln 10 = 2.30258509299404…
  assert.deepEqual(of("log", 1, 2, 10), [0, 0.6931471805599, 2.302585092994]);
  assert.deepEqual(of("log1p", 0, 1, 9), [0, 0.6931471805599, 2.302585092994]);
  assert.deepEqual(of("sqrt", 0, 2, 9), [0, 1.414213562373, 3]);
  assert.deepEqual(of("rank", 7, -2, 7, 100), [2.5, 1, 2.5, 4]);
});

const UNDEFINED = [["log", 0], ["log", -1], ["log1p", -1], ["sqrt", -0.5]] as const;
for (const [transform, value] of UNDEFINED) {
  Deno.test(`transformValues() names the row when ${transform} of ${value} is asked`, () => {
    assert.throws(
      () => transformValues(Float64Array.of(1, value), transform, { nameOf }),
      (error: Error) =>
        error instanceof UnfitDataError && error.message.includes(`row 1 holds ${value}`) &&
        error.message.includes(`--transform ${transform}`),
    );
  });
}

Deno.test("ranks() shares the mean rank when values are tied", () => {
  assert.deepEqual(ranks(Float64Array.of(3, 3, 3)), Float64Array.of(2, 2, 2));
  assert.deepEqual(ranks(Float64Array.of(1, 0, 1, 0)), Float64Array.of(3.5, 1.5, 3.5, 1.5));
});

/** Source: scipy 1.17.1, scipy.stats.norm.ppf. */
const NORMAL = [
  [1e-300, -37.0470962993612],
  [1e-20, -9.262340089798409],
  [0.001, -3.090232306167813],
  [0.07, -1.4757910281791706],
  [0.075, -1.4395314709384563],
  [0.3, -0.5244005127080409],
  [0.5, 0],
  [0.93, 1.475791028179171],
  [0.999, 3.090232306167813],
];
Deno.test("normalQuantile() agrees with scipy from the middle to the far tail", () => {
  for (const [p, quantile] of NORMAL) assertClose(normalQuantile(p), quantile, 1e-14, `at ${p}`);
});

Deno.test("normalScores() are Blom's, in the order of the values", () => {
  // Source: scipy 1.17.1, norm.ppf((r - 3/8) / 5.25) for r = 1 … 5.
  const scores = normalScores(Float64Array.of(40, 10, 1000, 20, 30));
  const expected = [0.49720057068155404, -1.1797611176118612, 1.1797611176118612];
  assertClose(scores[0], expected[0], 1e-13);
  assertClose(scores[1], expected[1], 1e-13);
  assertClose(scores[2], expected[2], 1e-13);
  assert.equal(scores[4], 0);
});

Deno.test("freemanTukey() is the square root form of Cressie & Read", () => {
  // 0 of 1,000: 0 + 1; 8 of 2,000: sqrt(4) + sqrt(4.5)
  const counts = { cases: Float64Array.of(0, 8), population: Float64Array.of(1000, 2000) };
  const [none, eight] = freemanTukey(counts);
  assertClose(none, 1, 1e-14);
  assertClose(eight, 2 + Math.sqrt(4.5), 1e-14);
});

Deno.test("roundDigits() keeps 13 significant digits, however large or small", () => {
  assert.deepEqual(
    roundDigits(Float64Array.of(1 / 3, -2e20 / 3, 0, 1e-300 / 3)),
    Float64Array.of(0.3333333333333, -66666666666670000000, 0, 3.333333333333e-301),
  );
});

import assert from "node:assert/strict";
import { hypergeometricUpperTail } from "../../lib/statistics/hypergeometric.ts";
import { assertClose } from "../support/close.ts";

/** n over k, by multiplying. */
function choose(n: number, k: number): number {
  let ways = 1;
  for (let i = 0; i < k; i++) ways = ways * (n - i) / (i + 1);
  return k < 0 || k > n ? 0 : ways;
}

Deno.test("hypergeometricUpperTail() is the share of all ways to draw when numbers are small", () => {
  for (let population = 1; population <= 9; population++) {
    for (let marked = 0; marked <= population; marked++) {
      for (let drawn = 0; drawn <= population; drawn++) {
        for (let least = 0; least <= drawn + 1; least++) {
          let ways = 0;
          for (let count = least; count <= drawn; count++) {
            ways += choose(marked, count) * choose(population - marked, drawn - count);
          }
          const share = ways / choose(population, drawn);
          const found = hypergeometricUpperTail(least, { population, marked, drawn });
          assert.ok(Math.abs(found - share) < 1e-13, `${least} of ${drawn}: ${found}, ${share}`);
        }
      }
    }
  }
});

// scipy.stats.hypergeom.sf 1.17.1.
Deno.test("hypergeometricUpperTail() has the chances of scipy when numbers are large", () => {
  const draw = { population: 9999, marked: 3000, drawn: 100 };
  assertClose(hypergeometricUpperTail(60, draw), 4.158066462724317e-10, 1e-10);
  const many = { population: 50_000, marked: 100, drawn: 4000 };
  assertClose(hypergeometricUpperTail(20, many), 0.00011352735066825703, 1e-10);
});

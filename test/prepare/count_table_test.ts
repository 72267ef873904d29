import assert from "node:assert/strict";
import {
  binomialTable,
  countTable,
  poissonTable,
  tableQuantiles,
} from "../../lib/prepare/count_table.ts";
import { assertClose } from "../support/close.ts";

Deno.test("poissonTable() has the probabilities e^-mean mean^k / k!", () => {
  const { first, terms, total } = poissonTable(2.5);
  assert.equal(first, 0);
  for (let k = 0, factorial = 1; k < 12; factorial *= ++k) {
    assertClose(terms[k] / total, Math.exp(-2.5) * 2.5 ** k / factorial, 1e-13, `P(X = ${k})`);
  }
});

Deno.test("binomialTable() has the probabilities of 4 throws of a loaded coin", () => {
  // C(4, k) 0.7^k 0.3^(4 - k)
  const { first, terms, total } = binomialTable(4, 0.7);
  assert.equal(first, 0);
  [0.0081, 0.0756, 0.2646, 0.4116, 0.2401].forEach((probability, k) =>
    assertClose(terms[k] / total, probability, 1e-13, `P(X = ${k})`)
  );
});

Deno.test("tableQuantiles() is 0 when nothing is expected", () => {
  assert.deepEqual(tableQuantiles(poissonTable(0), [0.001, 0.999]), [0, 0]);
  assert.deepEqual(tableQuantiles(binomialTable(9, 0), [0.001, 0.999]), [0, 0]);
});

Deno.test("countTable() is binomial for a share and Poisson for all else", () => {
  const counts = { cases: Float64Array.of(2), population: Float64Array.of(4) };
  assert.deepEqual(countTable(counts, 0, 0.7), poissonTable(2.8));
  assert.deepEqual(countTable({ ...counts, share: true }, 0, 0.7), binomialTable(4, 0.7));
});

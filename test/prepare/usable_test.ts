import assert from "node:assert/strict";
import { usableAreas } from "../../lib/prepare/usable.ts";

Deno.test("usableAreas() uses every area when nothing speaks against it", () => {
  const { kept, usable, tested, leftOut, counts } = usableAreas({ count: 3 });
  assert.deepEqual(kept, Uint32Array.of(0, 1, 2));
  assert.deepEqual(usable, Uint8Array.of(1, 1, 1));
  assert.deepEqual(tested, Uint8Array.of(1, 1, 1));
  assert.deepEqual(leftOut, [null, null, null]);
  assert.deepEqual(counts, []);
});

Deno.test("usableAreas() keeps what --where selects and gives each other row its first reason", () => {
  const { kept, usable, tested, leftOut, counts } = usableAreas({
    count: 7,
    kinds: Uint8Array.of(3, 0, 3, 3, 3, 0, 3),
    reasons: [null, null, "value missing: *", "value missing", null, "value missing", null],
    where: (row) => row !== 5,
    valueWhere: (row) => row !== 4 && row !== 3,
  });
  // Row 1 has no geometry; 2 and 3 no value (3 before its value filter); 4 is not tested
  // but has a value, so it stays a neighbor; 5 is filtered.
  assert.deepEqual(kept, Uint32Array.of(0, 1, 2, 3, 4, 6));
  assert.deepEqual(usable, Uint8Array.of(1, 0, 0, 0, 1, 1));
  assert.deepEqual(tested, Uint8Array.of(1, 0, 0, 0, 0, 1));
  assert.deepEqual(leftOut, [
    null,
    "no geometry",
    "value missing: *",
    "value missing",
    "not selected by --value-where",
    "not selected by --where",
    null,
  ]);
  assert.deepEqual(counts, [
    { reason: "not selected by --where", count: 1 },
    { reason: "no geometry", count: 1 },
    { reason: "value missing", count: 1 },
    { reason: "value missing: *", count: 1 },
    { reason: "not selected by --value-where", count: 1 },
  ]);
});

Deno.test("usableAreas() counts every left-out row exactly once", () => {
  const count = 200;
  const { leftOut, counts, tested, kept } = usableAreas({
    count,
    kinds: Uint8Array.from({ length: count }, (_, row) => row % 7 === 0 ? 0 : 3),
    reasons: Array.from(
      { length: count },
      (_, row) => row % 5 === 0 ? `value missing: ${row % 3}` : null,
    ),
    where: (row) => row % 11 !== 0,
    valueWhere: (row) => row % 2 === 0,
  });
  const used = tested.reduce((sum, one) => sum + one, 0);
  const out = counts.reduce((sum, { count }) => sum + count, 0);
  assert.equal(used + out, count);
  kept.forEach((row, at) => assert.equal(tested[at] === 1, leftOut[row] === null));
});

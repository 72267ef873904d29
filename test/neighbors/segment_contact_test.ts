import assert from "node:assert/strict";
import { type Segment, segmentContact } from "../../lib/neighbors/segment_contact.ts";

const segment = (ax: number, ay: number, bx: number, by: number): Segment => ({ ax, ay, bx, by });
const base = segment(0, 0, 10, 0);

Deno.test("segmentContact() is null beyond the reach, and measures the gap within it", () => {
  assert.equal(segmentContact(base, segment(0, 2, 10, 2), 1), null);
  assert.equal(segmentContact(base, segment(12, 0, 20, 0), 1), null);
  assert.deepEqual(segmentContact(base, segment(5, 0.5, 5, 9), 1), {
    gap: 0.5,
    stretch: 0,
    crosses: false,
  });
});

Deno.test("segmentContact() measures how far segments run beside each other", () => {
  // From 4 to 10 of the base, drifting from 0.2 to 0.5 at 10 and on to 0.7 at 14.
  const beside = segmentContact(base, segment(14, 0.7, 4, 0.2), 1);
  assert.equal(beside?.stretch, 6);
  assert.equal(segmentContact(base, segment(14, 0.7, 4, 0.2), 0.4)?.stretch, 0);
});

Deno.test("segmentContact() sees head-to-tail segments and steep ones as touching in a point", () => {
  assert.deepEqual(segmentContact(base, segment(10, 0, 20, 0), 1), {
    gap: 0,
    stretch: 0,
    crosses: false,
  });
  assert.equal(segmentContact(base, segment(3, 0, 4, 1), 1)?.stretch, 0);
});

Deno.test("segmentContact() tells crossing from an end that pokes through", () => {
  assert.deepEqual(segmentContact(base, segment(5, -3, 5, 3), 1), {
    gap: 0,
    stretch: 0,
    crosses: true,
  });
  assert.equal(segmentContact(base, segment(5, -0.5, 5, 3), 1)?.crosses, false);
  assert.equal(segmentContact(base, segment(12, -3, 12, 3), 1), null);
});

Deno.test("segmentContact() takes a segment without length as a point", () => {
  assert.deepEqual(segmentContact(base, segment(3, 1, 3, 1), 1), {
    gap: 1,
    stretch: 0,
    crosses: false,
  });
  assert.equal(segmentContact(base, segment(3, 2, 3, 2), 1), null);
});

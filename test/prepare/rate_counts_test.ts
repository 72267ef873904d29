import assert from "node:assert/strict";
import { UnfitDataError } from "../../lib/layer/errors.ts";
import { numbersOf } from "../../lib/prepare/numbers.ts";
import { checkCounts } from "../../lib/prepare/rate_counts.ts";

function field(name: string, ...cells: (string | null)[]) {
  const column = { name, kind: "text", storedAs: "String", values: cells } as const;
  return { name, numbers: numbersOf(column, { missing: ["*"] }) };
}

Deno.test("checkCounts() leaves out a row and says which field lacks what", () => {
  const { reasons, notes } = checkCounts(
    field("deaths", "3", "*", null, "4", "0", "0"),
    field("people", "10", "10", null, "*", "0", "12.5"),
  );
  assert.deepEqual(reasons, [
    null,
    "deaths: value missing: *",
    "deaths: value missing",
    "people: value missing: *",
    "people: population is 0",
    null,
  ]);
  assert.deepEqual(notes, []);
});

Deno.test("checkCounts() points out cases without a population", () => {
  const { notes } = checkCounts(field("deaths", "3", "0", "2"), field("people", "0", "0", "9"));
  assert.equal(notes.length, 1);
  assert.match(notes[0], /^1 of the areas .* people have cases in deaths$/);
});

const FAULTS = [
  { when: "a count is negative", cases: "-2", population: "10", says: /deaths.*row 2.*-2.*whole/ },
  {
    when: "a count is not whole",
    cases: "2.5",
    population: "10",
    says: /deaths.*row 2.*2\.5.*whole/,
  },
  {
    when: "a population is negative",
    cases: "2",
    population: "-9",
    says: /people.*row 2.*-9.*0 or more/,
  },
];
for (const { when, cases, population, says } of FAULTS) {
  Deno.test(`checkCounts() names field and row when ${when}`, () => {
    assert.throws(
      () => checkCounts(field("deaths", "1", cases), field("people", "10", population)),
      (error: Error) => error instanceof UnfitDataError && says.test(error.message),
    );
  });
}

Deno.test("checkCounts() takes more cases than population but for a share", () => {
  const deaths = field("deaths", "1", "12"), people = field("people", "10", "10");
  assert.deepEqual(checkCounts(deaths, people).reasons, [null, null]);
  assert.throws(
    () => checkCounts(deaths, people, { share: true }),
    /share as row 2 \(_row 1\) has 12 cases \(deaths\) in a population of 10 \(people\); leave out --share/,
  );
  assert.throws(
    () => checkCounts(deaths, field("people", "10.5", "99"), { share: true }),
    /10\.5.*whole/,
  );
});

import assert from "node:assert/strict";
import { glossary } from "../../lib/report/rule_glossary.ts";
import { citedIn } from "../../lib/report/references.ts";

Deno.test("glossary() explains the terms, options and operators that occur", () => {
  const terms = glossary(["touching upto=2", "(edge + nearest:4 mutual) - within:3km"])
    .map(([term]) => term);
  assert.deepEqual(terms, [
    "touching",
    "edge",
    "nearest:K",
    "within:D",
    "upto=N",
    "mutual",
    "A + B",
    "A - B",
  ]);
});

Deno.test("glossary() takes names in quotes for no terms", () => {
  assert.deepEqual(glossary(['links:"touching & edge - 2.csv"']).map(([term]) => term), [
    "links:FILE",
  ]);
});

Deno.test("citedIn() finds the references of a text", () => {
  assert.deepEqual(citedIn("as in Holm 1979, and by Cliff & Ord 1981."), [
    "Cliff & Ord 1981",
    "Holm 1979",
  ]);
});

import assert from "node:assert/strict";
import { nearestName, suggestion } from "../../lib/layer/nearest_name.ts";

Deno.test("nearestName() finds a name with letters swapped, dropped, added or in another case", () => {
  const names = ["population", "cases", "SID74", "rate"];
  assert.equal(nearestName("popualtion", names), "population");
  assert.equal(nearestName("case", names), "cases");
  assert.equal(nearestName("sid74", names), "SID74");
  assert.equal(nearestName("ratte", names), "rate");
});

Deno.test("nearestName() is null when nothing is like the name", () => {
  assert.equal(nearestName("income", ["population", "cases"]), null);
  assert.equal(nearestName("income", []), null);
});

Deno.test("nearestName() takes the earlier of two equally near names", () => {
  assert.equal(nearestName("rat1", ["rat2", "rat3"]), "rat2");
});

Deno.test("suggestion() continues a sentence or is empty", () => {
  assert.equal(suggestion("case", ["cases"]), '; did you mean "cases"');
  assert.equal(suggestion("xyz", ["cases"]), "");
});

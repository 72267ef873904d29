import assert from "node:assert/strict";
import { fitNames, renamedFields } from "../../lib/write/field_names.ts";

Deno.test("fitNames() keeps names that fit", () => {
  assert.deepEqual(fitNames(["SID74", "Ærø", "a b"], { bytes: 10 }), ["SID74", "Ærø", "a b"]);
  assert.deepEqual(fitNames(["a-b", "2020", ""], {}), ["a-b", "2020", ""]);
});

Deno.test("fitNames() shortens before the ending, which tells results apart", () => {
  assert.deepEqual(
    fitNames(["unemployment", "unemployment_class", "unemployment_p", "unemployment_steady"], {
      bytes: 10,
    }),
    ["unemployme", "unem_class", "unemploy_p", "une_steady"],
  );
});

Deno.test("fitNames() counts bytes, not letters, and cuts no letter in two", () => {
  // é takes two bytes, so ten hold five of them.
  assert.deepEqual(fitNames(["éééééé", "xééééé"], { bytes: 10 }), ["ééééé", "xéééé"]);
});

Deno.test("fitNames() numbers names that collide, giving way to names that fit", () => {
  assert.deepEqual(
    fitNames(["population_1990", "population_2000", "population"], { bytes: 10 }),
    ["populatio2", "populatio3", "population"],
  );
});

Deno.test("fitNames() takes names that differ only in letter case for the same", () => {
  assert.deepEqual(fitNames(["Name", "name", "NAME"], {}), ["Name", "name2", "NAME3"]);
});

Deno.test("fitNames() leaves only letters, digits and underscores where asked", () => {
  const names = ["Ærø Süd", "中文", "2020", "a-b", "_ok1"];
  assert.deepEqual(fitNames(names, { letters: "any" }), [
    "Ærø_Süd",
    "中文",
    "_2020",
    "a_b",
    "_ok1",
  ]);
  assert.deepEqual(fitNames(names, { letters: "ascii" }), [
    "_r__Sud",
    "__",
    "_2020",
    "a_b",
    "_ok1",
  ]);
});

Deno.test("fitNames() gives every field a name of its own within the limit, on many alike", () => {
  const names = Array.from({ length: 1200 }, (_, i) => `indicator number ${i}_class`);
  const fitted = fitNames(names, { bytes: 10 });
  assert.equal(new Set(fitted.map((name) => name.toLowerCase())).size, names.length);
  assert.ok(fitted.every((name) => new TextEncoder().encode(name).length <= 10));
  assert.deepEqual(fitNames(names, { bytes: 10 }), fitted);
});

Deno.test("renamedFields() lists the names that changed", () => {
  assert.deepEqual(renamedFields(["a", "b"], ["a", "c"]), [{ from: "b", to: "c" }]);
});

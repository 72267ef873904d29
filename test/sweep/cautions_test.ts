import assert from "node:assert/strict";
import { CAUTIONS } from "../../lib/sweep/cautions.ts";

Deno.test("CAUTIONS cover cause, persons, scale, small numbers, disclosure and review", () => {
  const text = CAUTIONS.map(({ title, text }) => `${title}. ${text}`).join(" ");
  for (
    const topic of [
      /not a cause/,
      /ecological fallacy/,
      /boundaries run and how large/,
      /small populations/,
      /disclosure rules/,
      /qualified statistician or epidemiologist/,
    ]
  ) assert.match(text, topic);
});

Deno.test("CAUTIONS are sentences, each said once", () => {
  assert.ok(CAUTIONS.every(({ title, text }) => /^[A-Z].*[^.]$/.test(title) && text.endsWith(".")));
  assert.equal(new Set(CAUTIONS.map(({ title }) => title)).size, CAUTIONS.length);
});

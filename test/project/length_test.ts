import assert from "node:assert/strict";
import { UsageError } from "../../lib/layer/errors.ts";
import { formatLength, parseLength } from "../../lib/project/length.ts";
import { fault } from "../support/fault.ts";

Deno.test("parseLength() turns every unit into meters", () => {
  assert.deepEqual(parseLength("800m"), { meters: 800, text: "800m" });
  assert.deepEqual(parseLength("2.5 km"), { meters: 2500, text: "2.5km" });
  assert.deepEqual(parseLength("250ft"), { meters: 76.2, text: "250ft" });
  assert.deepEqual(parseLength(" 30MI "), { meters: 48280.32, text: "30mi" });
  assert.equal(parseLength(".5km").meters, 500);
  assert.equal(parseLength("1e3m").meters, 1000);
});

Deno.test("parseLength() reads its own text back to the same length", () => {
  for (const text of ["0.1mi", "+7 ft", "12.25km", "1E2m"]) {
    const length = parseLength(text);
    assert.deepEqual(parseLength(length.text), length);
  }
});

Deno.test("parseLength() says what is wrong with a length", () => {
  const faults: [string, RegExp][] = [
    ["5", /"5", which has no unit; use m, km, ft or mi, as in 5km$/],
    ["5 miles", /unknown unit "miles"/],
    ["", /write a number and a unit/],
    ["km", /write a number and a unit/],
    ["0m", /more than 0/],
    ["-3km", /more than 0/],
    ["1e999m", /more than 0/],
    ["1,5km", /unknown unit ",5km"/],
  ];
  for (const [text, message] of faults) {
    assert.throws(() => parseLength(text), fault(UsageError, message));
  }
});

Deno.test("formatLength() keeps three digits and changes to kilometers at 1000 m", () => {
  assert.equal(formatLength(0), "0 m");
  assert.equal(formatLength(0.01234), "0.0123 m");
  assert.equal(formatLength(850.4), "850 m");
  assert.equal(formatLength(999.4), "999 m");
  assert.equal(formatLength(999.6), "1 km");
  assert.equal(formatLength(48280.32), "48.3 km");
  assert.equal(formatLength(1234567), "1235 km");
});

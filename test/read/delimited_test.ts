import assert from "node:assert/strict";
import { UnreadableError, UsageError } from "../../lib/layer/errors.ts";
import { parseDelimited, sniffDelimiter } from "../../lib/read/delimited.ts";
import { fault } from "../support/fault.ts";

const source = "a.csv";

Deno.test("sniffDelimiter() finds comma, semicolon, tab and pipe", () => {
  for (const delimiter of [",", ";", "\t", "|"]) {
    const text = [["a", "b", "c"], ["1", "2", "3"]].map((row) => row.join(delimiter)).join("\n");
    assert.equal(sniffDelimiter(text), delimiter);
  }
});

Deno.test("sniffDelimiter() sees through decimal commas", () => {
  assert.equal(sniffDelimiter("code;rate\nA;1,5\nB;2,5\n"), ";");
  // One comma in every row, the first included: the semicolon is rarer inside cells, so it wins.
  assert.equal(sniffDelimiter("town, code;rate\nA;1,5\nB;2,5\n"), ";");
});

Deno.test("sniffDelimiter() sees through delimiters inside quotes and cells of text", () => {
  assert.equal(sniffDelimiter('name,n\n"a;b;c",1\n"d;e",2\n'), ",");
  // A semicolon in the first line only agrees with 1 row of 3, the comma with all.
  assert.equal(sniffDelimiter("name; place,n\nA,1\nB,2\n"), ",");
  assert.equal(sniffDelimiter('name,n\n"two\nlines; here",1\n'), ",");
});

Deno.test("sniffDelimiter() leaves the comma out for a decimal comma where it can", () => {
  const text = "a,b,c;d,e,f\n1,2,3;4,5,6\n";
  assert.equal(sniffDelimiter(text), ",");
  assert.equal(sniffDelimiter(text, ","), ";");
  assert.equal(sniffDelimiter("a,b\n1,2\n", ","), ",");
});

Deno.test("sniffDelimiter() falls back to the comma for one column, and for nothing", () => {
  assert.equal(sniffDelimiter("code\nA\nB\n"), ",");
  assert.equal(sniffDelimiter(""), ",");
});

Deno.test("parseDelimited() keeps cells as they are: spaces, zeros, quotes, line ends", () => {
  const text = 'a;b\r\n 0042 ;"x ""y"";\r\nz"\r\n\r\n;\r\n';
  assert.deepEqual(parseDelimited(text, { source }), [
    ["a", "b"],
    [" 0042 ", 'x "y";\r\nz'],
    ["", ""],
  ]);
});

Deno.test("parseDelimited() obeys a named delimiter, the word tab, and sep= lines", () => {
  assert.deepEqual(parseDelimited("a;b|c\n1;2|3\n", { source, delimiter: "|" }), [
    ["a;b", "c"],
    ["1;2", "3"],
  ]);
  assert.deepEqual(parseDelimited("a\tb\n1\t2\n", { source, delimiter: "tab" })[1], ["1", "2"]);
  assert.deepEqual(parseDelimited("sep=;\r\na,b;c\r\n1,2;3\r\n", { source }), [
    ["a,b", "c"],
    ["1,2", "3"],
  ]);
  for (const delimiter of ["", "::", '"']) {
    assert.throws(
      () => parseDelimited("a", { source, delimiter }),
      fault(UsageError, /--delimiter/),
    );
  }
});

Deno.test("parseDelimited() starts at the line of the column names", () => {
  const text = "Table 1, rates\n(per 1000, all ages)\na;b\n1,5;2\n";
  assert.deepEqual(parseDelimited(text, { source, header: 3 }), [["a", "b"], ["1,5", "2"]]);
});

Deno.test("parseDelimited() names the line of a ragged row, counting lines inside quotes", () => {
  const text = 'a,b\n"two\nlines",2\n1\n';
  assert.throws(
    () => parseDelimited(text, { source }),
    fault(
      UnreadableError,
      /a\.csv as line 4 has 1 cell where the column names are 2 \(delimiter ,\)/,
    ),
  );
  assert.throws(
    () => parseDelimited("a\tb\n1\t2\t3\n", { source }),
    fault(UnreadableError, /line 2 has 3 cells where the column names are 2 \(delimiter tab\)/),
  );
});

Deno.test("parseDelimited() names the line of a stray quote", () => {
  assert.throws(
    () => parseDelimited('a,b\n1,"2\n', { source }),
    fault(UnreadableError, /line 2 is never closed/),
  );
  assert.throws(
    () => parseDelimited('a,b\n1,2"\n', { source }),
    fault(UnreadableError, /line 2 has a double/),
  );
  assert.throws(
    () => parseDelimited('a,b\n1,"2"x\n', { source }),
    fault(UnreadableError, /line 2 has a double/),
  );
});

import assert from "node:assert/strict";
import { parseRule, type Rule, ruleFamily, ruleNeeds, ruleText } from "../../lib/neighbors/rule.ts";
import { UsageError } from "../../lib/layer/errors.ts";
import { randomNumbers } from "../support/maps.ts";

Deno.test("parseRule() reads every term", () => {
  const read: [string, Rule][] = [
    ["touching", { kind: "touching" }],
    ["edge", { kind: "edge" }],
    ["nearest:8", { kind: "nearest", count: 8 }],
    ["within:5km", { kind: "within", distance: { meters: 5000, text: "5km" } }],
    ["triangulated", { kind: "triangulated" }],
    ["gabriel", { kind: "gabriel" }],
    ["relative", { kind: "relative" }],
    ["sphere", { kind: "sphere" }],
    ["same:REGION", { kind: "same", field: "REGION" }],
    ["links:travel-times.csv", { kind: "links", file: "travel-times.csv" }],
  ];
  for (const [text, rule] of read) assert.deepEqual(parseRule(text), rule);
});

Deno.test("parseRule() reads names in double quotes, with spaces, operators and quotes in them", () => {
  assert.deepEqual(parseRule('same:"Health + care"'), { kind: "same", field: "Health + care" });
  assert.deepEqual(parseRule('links:"my ""best"" (2).csv"'), {
    kind: "links",
    file: 'my "best" (2).csv',
  });
});

Deno.test("parseRule() binds & tighter than + and -, and groups from the left", () => {
  const [t, e, n] = [{ kind: "touching" }, { kind: "edge" }, { kind: "nearest", count: 2 }];
  assert.deepEqual(parseRule("touching + edge & nearest:2"), {
    kind: "union",
    left: t,
    right: { kind: "intersection", left: e, right: n },
  });
  assert.deepEqual(parseRule("touching - edge - nearest:2"), {
    kind: "difference",
    left: { kind: "difference", left: t, right: e },
    right: n,
  });
  assert.deepEqual(parseRule("touching - (edge - nearest:2)"), {
    kind: "difference",
    left: t,
    right: { kind: "difference", left: e, right: n },
  });
});

Deno.test("parseRule() binds options to the term or group before them", () => {
  assert.deepEqual(parseRule("touching + nearest:2 mutual"), {
    kind: "union",
    left: { kind: "touching" },
    right: { kind: "nearest", count: 2, mutual: true },
  });
  assert.deepEqual(parseRule("(touching + edge) upto=2 either islands=nearest"), {
    kind: "group",
    rule: { kind: "union", left: { kind: "touching" }, right: { kind: "edge" } },
    upto: 2,
    either: true,
    islands: "nearest",
  });
  assert.deepEqual(parseRule("(nearest:4 mutual) order=2"), {
    kind: "group",
    rule: { kind: "nearest", count: 4, mutual: true },
    order: 2,
  });
  assert.deepEqual(parseRule("edge snap=1m"), {
    kind: "edge",
    snap: { meters: 1, text: "1m" },
  });
});

Deno.test("parseRule() points at the character that is wrong", () => {
  const faults: [string, string][] = [
    [
      "toching + edge",
      'Unknown neighbor rule "toching"; did you mean "touching"\n  toching + edge\n  ^',
    ],
    [
      "touching + egde",
      'Unknown neighbor rule "egde"; did you mean "edge"\n  touching + egde\n             ^',
    ],
    ["touching+edge", "Put spaces around an operator\n  touching+edge\n          ^"],
    [
      "nearest:0",
      'Expected a whole number of 1 or more for "nearest" but found "0"\n  nearest:0\n          ^',
    ],
    [
      "nearest:2.5",
      'Expected a whole number of 1 or more for "nearest" but found "2.5"\n  nearest:2.5\n          ^',
    ],
    ["nearest", 'The neighbor rule "nearest" needs its argument; write nearest:8\n  nearest\n  ^'],
    ["edge:2", 'The neighbor rule "edge" takes no argument; write edge\n  edge:2\n      ^'],
    [
      "edge mutul",
      'Unknown option "mutul" of a neighbor rule; did you mean "mutual"\n  edge mutul\n       ^',
    ],
    [
      "edge nearest:2",
      'Expected an operator (+, & or -) before the rule "nearest"\n  edge nearest:2\n       ^',
    ],
    ["edge +", "Expected a neighbor rule but found the end of the text\n  edge +\n        ^"],
    ["edge & & edge", 'Expected a neighbor rule but found "&"\n  edge & & edge\n         ^'],
    ["(edge", "Cannot find the parenthesis that closes this one\n  (edge\n  ^"],
    ["edge)", "Cannot close a parenthesis never opened\n  edge)\n      ^"],
    [
      "nearest:2 mutual either",
      'Cannot have both "mutual" and "either"; choose one\n  nearest:2 mutual either\n                   ^',
    ],
    [
      "edge upto=2 upto=3",
      'Cannot give the option "upto" twice\n  edge upto=2 upto=3\n              ^',
    ],
    [
      "gabriel snap=1m",
      'The option "snap" follows only "touching" and "edge"\n  gabriel snap=1m\n          ^',
    ],
    [
      "edge islands=far",
      'The option "islands" takes only "nearest"\n  edge islands=far\n               ^',
    ],
    ["edge mutual=1", 'The option "mutual" takes no value\n  edge mutual=1\n       ^'],
    ["edge order", 'The option "order" needs a value, as in order=2\n  edge order\n       ^'],
    [
      'same:"A',
      'Cannot find the quote that closes this one in the neighbor rule\n  same:"A\n       ^',
    ],
    ["same:", "Expected the name of a field but found nothing\n  same:\n       ^"],
  ];
  for (const [text, message] of faults) {
    assert.throws(() => parseRule(text), (error: unknown) => {
      assert.ok(error instanceof UsageError, text);
      assert.equal(error.message, message);
      return true;
    });
  }
});

Deno.test("parseRule() refuses a distance of 0 or without a unit, and points at it", () => {
  for (const text of ["within:0m", "within:0", "within:5", "within:-1km"]) {
    assert.throws(
      () => parseRule(text),
      (error: unknown) =>
        error instanceof UsageError && error.message.endsWith(`\n  ${" ".repeat(7)}^`),
    );
  }
});

Deno.test("parseRule() refuses absurdly deep parentheses instead of overflowing", () => {
  const text = "(".repeat(100_000) + "edge" + ")".repeat(100_000);
  assert.throws(() => parseRule(text), /Cannot read more than 100 nested parentheses/);
});

Deno.test("ruleText() writes one text for all ways to write a rule", () => {
  const same: [string, string][] = [
    ["touching", "  ( touching  order=1 ) "],
    ["touching + edge + nearest:4", "(touching + edge) + nearest:4"],
    ["touching + (edge + nearest:4)", "touching + ((edge + nearest:4))"],
    ["(touching + edge) & nearest:4", "((touching + edge) upto=1) & nearest:4"],
    ["touching + edge & nearest:4", "touching + (edge & nearest:4)"],
    ["nearest:4 upto=2 mutual", "nearest:4 mutual upto=2"],
    ["(touching - edge) mutual", "(touching - edge) mutual"],
    ['same:"a b"', 'same:"a b"'],
    ["same:plain", 'same:"plain"'],
  ];
  for (const [canonical, text] of same) assert.equal(ruleText(parseRule(text)), canonical);
});

Deno.test("ruleText() is read back by parseRule() for any rule", () => {
  const draws = randomNumbers(40_000, "rules");
  let next = 0;
  const pick = (most: number) => Math.floor(draws[next++] * most);
  for (let trial = 0; trial < 500; trial++) {
    const text = ruleText(randomRule(pick, 4));
    assert.equal(ruleText(parseRule(text)), text);
  }
});

/** A rule of any shape, nested at most `depth` levels. */
function randomRule(pick: (most: number) => number, depth: number): Rule {
  const options = [{}, {}, { order: 2 }, { upto: 3, mutual: true }, { either: true }, {
    islands: "nearest",
  }] as const;
  const terms: Rule[] = [
    { kind: "touching", snap: { meters: 2, text: "2m" } },
    { kind: "edge" },
    { kind: "nearest", count: 1 + pick(9) },
    { kind: "within", distance: { meters: 2500, text: "2.5km" } },
    { kind: "same", field: 'odd "name", (really) + more' },
    { kind: "links", file: "a-b.csv" },
  ];
  const shape = depth === 0 ? 0 : pick(4);
  if (shape <= 1) return { ...terms[pick(terms.length)], ...options[pick(options.length)] } as Rule;
  if (shape === 2) {
    return { kind: "group", rule: randomRule(pick, depth - 1), ...options[pick(options.length)] };
  }
  const kind = (["union", "intersection", "difference"] as const)[pick(3)];
  return { kind, left: randomRule(pick, depth - 1), right: randomRule(pick, depth - 1) };
}

Deno.test("ruleFamily() is that of the first term", () => {
  const families: [string, string][] = [
    ["touching", "contiguity"],
    ["edge upto=2", "contiguity"],
    ["nearest:4 mutual", "nearest"],
    ["within:2km", "band"],
    ["sphere", "graph"],
    ["same:REGION", "links"],
    ["links:f.csv", "links"],
    ["touching + nearest:4", "contiguity"],
    ["(within:2km & touching) mutual - gabriel", "band"],
  ];
  for (const [text, family] of families) assert.equal(ruleFamily(parseRule(text)), family);
});

Deno.test("ruleNeeds() collects points, boundaries, fields and files", () => {
  assert.deepEqual(ruleNeeds(parseRule("touching upto=2")), {
    points: false,
    boundaries: true,
    snap: null,
    fields: [],
    linkFiles: [],
  });
  assert.deepEqual(
    ruleNeeds(parseRule("(same:A + same:B & same:A) islands=nearest - links:f.csv")),
    {
      points: true,
      boundaries: false,
      snap: null,
      fields: ["A", "B"],
      linkFiles: ["f.csv"],
    },
  );
  assert.equal(ruleNeeds(parseRule("edge + gabriel")).points, true);
  assert.equal(ruleNeeds(parseRule("touching snap=1m + edge snap=2m")).snap?.meters, 2);
});

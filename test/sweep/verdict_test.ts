import assert from "node:assert/strict";
import type {
  DefinitionResult,
  FamilyFinding,
  SweepResults,
} from "../../lib/sweep/sweep_results.ts";
import { type Verdict, verdictOf } from "../../lib/sweep/verdict.ts";
import type { FlaggedArea, VerdictInput } from "../../lib/sweep/verdict_input.ts";
import { randomNumbers } from "./small_maps.ts";

/** The words that assert a pattern; where nothing is shown only the denial in the headline may have one. */
const ASSERTS = /cluster|dispers|alike/i;
const DENIAL = "No clustering of";
/** What no verdict may say, whatever the numbers: a map does not show why. */
const BLAMES = /\bcaus|because|due to|reason|lead(s|ing)? to|explain|prove/i;

interface Situation {
  readonly value?: number | null;
  readonly p?: number | null;
  readonly level?: number;
  readonly adjust?: string;
  readonly tested?: number;
  readonly islands?: number;
  readonly counts?: Record<string, number>;
  readonly permutations?: number;
  readonly enumerated?: boolean;
}

/** A run of the main definition, `touching`; expected I is -1 / (n - 1). */
function runOf(situation: Situation): VerdictInput["run"] {
  const { value = 0, p = 0.5, level = 0.05, adjust = "bh", tested = 100, islands = 0 } = situation;
  const { counts = {}, permutations = 999, enumerated = false } = situation;
  const significant = Object.values(counts).reduce((sum, count) => sum + count, 0);
  const expected = value === null ? null : -1 / (tested + islands - 1);
  return {
    indicator: "rate",
    neighbors: { rule: "touching", islands },
    weights: "equal",
    global: { moranI: { value, expected, p, permutations, enumerated } },
    local: { level, adjust, tested, significant, counts },
  };
}

interface SweepSituation {
  readonly median: number | null;
  readonly p: number | null;
  readonly range?: readonly [number, number];
  readonly definitions?: number;
  readonly stability?: Partial<SweepResults["stability"]>;
  readonly permutations?: number;
}

function sweepOf(situation: SweepSituation): SweepResults {
  const { median, p, range = [0.1, 0.5], definitions = 4, stability = {} } = situation;
  const one: DefinitionResult = {
    rule: "touching",
    weights: "equal",
    family: "contiguity",
    main: true,
    sameAs: [],
    pairs: 250,
    islands: 0,
    components: 1,
    meanNeighbors: 5,
    value: range[0],
    z: median,
    p,
    pAdjusted: p,
    significantAreas: 0,
    overlap: null,
  };
  return {
    permutations: situation.permutations ?? 999,
    localPermutations: 99_999,
    definitions: new Array<DefinitionResult>(definitions).fill(one),
    joint: {
      median,
      p,
      share: 0.5,
      shareP: p,
      direction: (median ?? 0) >= 0 ? "positive" : "negative",
      smallest: range[0],
      largest: range[1],
    },
    stability: {
      steady: 0,
      mostly: 0,
      fragile: 0,
      quiet: 0,
      flaggedSteady: 0,
      onlyElsewhere: [],
      flips: [],
      ...stability,
    },
  };
}

function family(
  name: FamilyFinding["family"],
  definitions: number,
  positive: number,
  negative = 0,
): FamilyFinding {
  return { family: name, definitions, positive, negative };
}

function textOf({ headline, sentences }: Verdict): string {
  return [headline, ...sentences].join(" ");
}

/** Nothing is shown, and no sentence asserts otherwise. */
function assertNothingShown(verdict: Verdict): void {
  assert.equal(verdict.clustered, "not shown");
  assert.ok(verdict.headline.startsWith(DENIAL), verdict.headline);
  assert.doesNotMatch(textOf(verdict).replace(DENIAL, ""), ASSERTS);
}

Deno.test("verdictOf() says strongly clustered, over which range, how surely, where and how steady", () => {
  const names = ["Ashe", "Bertie", "Clay", "Dare"];
  const verdict = verdictOf({
    run: runOf({ value: 0.62, p: 0.002, counts: { "high among high": 12, "low among low": 9 } }),
    sweep: sweepOf({
      median: 6,
      p: 0.002,
      range: [0.31, 0.65],
      stability: { flaggedSteady: 18, onlyElsewhere: [4, 7] },
    }),
    families: [family("contiguity", 2, 2), family("nearest", 2, 2)],
    flagged: names.map((name): FlaggedArea => ({
      name,
      class: "high among high",
      steady: "steady",
    })),
  });
  assert.equal(verdict.clustered, "clustered");
  assert.equal(
    verdict.headline,
    'Values of "rate" are strongly clustered (joint p = 0.002 over 4 definitions of neighbor)',
  );
  const text = textOf(verdict);
  assert.match(text, /more alike than chance would make them: Moran's I is 0\.62/);
  assert.match(text, /I runs from 0\.31 to 0\.65/);
  assert.match(text, /21 areas stand out \(level 0\.05, adjusted for testing 100 areas\)/);
  assert.match(text, /12 high among high \(Ashe, Bertie, Clay, and 9 more\) and 9 low among low\./);
  assert.match(text, /18 of these areas are steady/);
  assert.match(text, /2 areas stand out under other definitions only/);
  assert.match(text, /No kind of definition changes the answer/);
  assert.match(text, /cannot say what lies behind this, nor anything about single persons/);
});

Deno.test("verdictOf() names steady areas before others", () => {
  const area = (name: string, steady: FlaggedArea["steady"]) => ({
    name,
    class: "low among low",
    steady,
  });
  const text = textOf(verdictOf({
    run: runOf({ value: 0.4, p: 0.002, counts: { "low among low": 5 } }),
    sweep: sweepOf({ median: 5, p: 0.002, stability: { flaggedSteady: 2 } }),
    flagged: [
      area("Ashe", "fragile"),
      area("Bertie", "steady"),
      area("Clay", "mostly"),
      area("Dare", "steady"),
      area("Edgecombe", "mostly"),
    ],
  }));
  assert.match(text, /5 low among low \(Bertie, Dare, Ashe, and 2 more\)\./);
});

Deno.test("verdictOf() says weakly where I is near its expectation, and that no area carries it", () => {
  const verdict = verdictOf({
    run: runOf({ value: 0.09, p: 0.03 }),
    sweep: sweepOf({ median: 2.4, p: 0.024 }),
  });
  assert.match(verdict.headline, /weakly clustered \(joint p = 0\.024/);
  assert.match(textOf(verdict), /finding about the whole map and not about particular places/);
  assert.doesNotMatch(textOf(verdict), /strongly|moderately|steady/);
});

Deno.test("verdictOf() finds nothing on a map without pattern and does not call that an absence", () => {
  const verdict = verdictOf({
    run: runOf({ value: -0.02, p: 0.8 }),
    sweep: sweepOf({ median: -0.2, p: 0.81, range: [-0.05, 0.03] }),
    families: [family("contiguity", 2, 0), family("band", 2, 0)],
  });
  assertNothingShown(verdict);
  const text = textOf(verdict);
  assert.match(text, /above the level of 0\.05/);
  assert.match(text, /No single area stands out either/);
  assert.match(text, /does not show that there is no pattern/);
  assert.match(text, /No kind of definition changes the answer/);
});

Deno.test("verdictOf() says dispersed where neighbors differ more than by chance", () => {
  const verdict = verdictOf({
    run: runOf({ value: -0.45, p: 0.002, counts: { "high among low": 1 } }),
    sweep: sweepOf({ median: -5, p: 0.002, range: [-0.5, -0.2], stability: { flaggedSteady: 1 } }),
    families: [family("contiguity", 2, 0, 2), family("nearest", 2, 0, 1)],
  });
  assert.equal(verdict.clustered, "dispersed");
  assert.match(verdict.headline, /moderately dispersed/);
  const text = textOf(verdict);
  assert.match(text, /less alike than chance/);
  assert.doesNotMatch(text, /cluster|more alike/);
  assert.match(text, /1 area stands out .*1 high among low\. That area is steady/);
});

Deno.test("verdictOf() does not let one family carry the verdict, and names it", () => {
  const verdict = verdictOf({
    run: runOf({ value: 0.11, p: 0.012, counts: { "high among high": 2 } }),
    sweep: sweepOf({ median: 0.9, p: 0.21 }),
    families: [family("contiguity", 3, 3), family("nearest", 6, 0), family("band", 5, 1)],
  });
  assertNothingShown(verdict);
  const text = textOf(verdict);
  assert.match(text, /main definition by itself gives p = 0\.012 and would have passed the level/);
  assert.match(text, /that result does not stand/);
  assert.match(text, /2 areas stand out .* take them as single findings to check one by one/);
  assert.match(
    text,
    /What would change the answer: .*shared boundaries \(3 of 3 within the level\)\./,
  );
  assert.doesNotMatch(text, /nearest areas|distance bands/);
});

Deno.test("verdictOf() names the families that disagree with a finding", () => {
  const text = textOf(verdictOf({
    run: runOf({ value: 0.2, p: 0.09 }),
    sweep: sweepOf({ median: 3, p: 0.01 }),
    families: [family("contiguity", 3, 1), family("nearest", 6, 6), family("graph", 2, 0)],
  }));
  assert.match(text, /p = 0\.09 and would not have passed the level; the answer rests on the def/);
  assert.match(
    text,
    /only, shared boundaries \(1 of 3 within the level\) or graphs on the points \(0 of 2 within/,
  );
});

Deno.test("verdictOf() says so where the main definition points the other way", () => {
  const verdict = verdictOf({
    run: runOf({ value: -0.15, p: 0.2 }),
    sweep: sweepOf({ median: 3, p: 0.01 }),
  });
  assert.equal(verdict.clustered, "clustered");
  assert.match(textOf(verdict), /main definition by itself points the other way \(p = 0\.2\)/);
  assert.match(verdict.headline, /weakly/);
});

Deno.test("verdictOf() says that one kind of definition is not every kind", () => {
  const text = textOf(verdictOf({
    run: runOf({ value: 0.4, p: 0.002 }),
    sweep: sweepOf({ median: 4, p: 0.002 }),
    families: [family("nearest", 4, 4)],
  }));
  assert.match(text, /All definitions tried are of one kind \(nearest areas\)/);
});

Deno.test("verdictOf() goes by the global test without a sweep and says that others were not tried", () => {
  const found = verdictOf({ run: runOf({ value: 0.4, p: 0.002 }), sweep: null });
  assert.equal(found.clustered, "clustered");
  assert.match(found.headline, /\(p = 0\.002 with one definition of neighbor\)/);
  assert.match(textOf(found), /Other definitions of neighbor were not tried/);
  assert.doesNotMatch(textOf(found), /joint|steady|taken together/);
  assertNothingShown(verdictOf({ run: runOf({ value: 0.4, p: 0.06 }), sweep: null }));
  const alone = verdictOf({
    run: runOf({ value: 0.4, p: 0.002 }),
    sweep: sweepOf({ median: 4, p: 0.002, definitions: 1 }),
  });
  assert.match(textOf(alone), /Other definitions of neighbor could not be tried/);
});

Deno.test("verdictOf() warns of few areas, of areas alone, and of a level out of reach", () => {
  const few = textOf(verdictOf({ run: runOf({ tested: 9, islands: 1 }), sweep: null }));
  assert.match(few, /With 10 areas only a strong pattern can be found/);
  assert.match(few, /1 of 10 areas has no neighbor/);
  const islands = textOf(verdictOf({ run: runOf({ tested: 1500, islands: 500 }), sweep: null }));
  assert.match(islands, /500 of 2,000 areas have no neighbor in the main definition/);
  assert.doesNotMatch(islands, /only a strong pattern/);
  assert.doesNotMatch(
    textOf(verdictOf({ run: runOf({ islands: 2 }), sweep: null })),
    /no neighbor/,
  );
  const coarse = { level: 0.01, permutations: 99 };
  const sampled = verdictOf({
    run: runOf(coarse),
    sweep: sweepOf({ median: 3, p: 0.02, permutations: 99 }),
  });
  assert.match(textOf(sampled), /99 permutations are too few for this level: .* is 0\.02\./);
  const orders = { level: 0.05, tested: 4, permutations: 24, enumerated: true };
  assert.match(
    textOf(verdictOf({ run: runOf(orders), sweep: null })),
    /only 24 arrangements: .* 0\.083,/,
  );
});

Deno.test("verdictOf() counts what chance alone would flag where p is not adjusted", () => {
  const counts = { "high among high": 30 };
  const text = textOf(verdictOf({
    run: runOf({ value: 0.4, p: 0.002, tested: 1000, adjust: "none", counts }),
    sweep: null,
  }));
  assert.match(text, /not adjusted for testing 1,000 areas: about 50 would by chance alone/);
});

Deno.test("verdictOf() has words for numbers that are undefined", () => {
  const verdict = verdictOf({
    run: runOf({ value: null, p: null, tested: 0, islands: 40 }),
    sweep: { ...sweepOf({ median: null, p: null }) },
  });
  assertNothingShown(verdict);
  assert.match(verdict.headline, /the test is undefined here/);
  assert.match(textOf(verdict), /Moran's I is undefined with the main definition/);
  assert.match(textOf(verdict), /None of the 4 definitions tried can tell/);
  assert.doesNotMatch(textOf(verdict), /null|NaN|undefined is/);
});

Deno.test("verdictOf() never asserts more than the joint test, whatever the other numbers", () => {
  const random = randomNumbers(77);
  const whole = (most: number) => Math.floor(random() * (most + 1));
  const names: FamilyFinding["family"][] = [
    "contiguity",
    "nearest",
    "band",
    "graph",
    "weighted",
    "links",
  ];
  const situation = (p: number, level: number): VerdictInput => ({
    run: {
      ...runOf({
        value: 2 * random() - 1,
        p: Math.max(0.001, random() ** 3),
        level,
        adjust: random() < 0.3 ? "none" : "bh",
        tested: 3 + whole(500),
        islands: random() < 0.5 ? 0 : whole(50),
        counts: {
          "high among high": whole(20),
          "low among low": whole(2),
          "low among high": whole(1),
        },
      }),
      weights: random() < 0.5 ? "equal" : "inverse:1",
    },
    sweep: sweepOf({
      median: 8 * random() - 4,
      p,
      range: [random() - 1, random()],
      definitions: 1 + whole(20),
      stability: {
        flaggedSteady: whole(20),
        onlyElsewhere: new Array(whole(3)).fill(0),
        flips: new Array(whole(2)).fill(0),
      },
    }),
    families: names.slice(0, whole(6)).map((name) => family(name, 8, whole(8))),
    flagged: random() < 0.5 ? [] : [{ name: "Ashe", class: "high among high", steady: "fragile" }],
  });
  for (let round = 0; round < 1000; round++) {
    const level = [0.1, 0.05, 0.01, 0.001][whole(3)];
    const above = level + (1 - level) * Math.max(random(), 1e-9) ** 4;
    const verdict = verdictOf(situation(above, level));
    assertNothingShown(verdict);
    assert.doesNotMatch(textOf(verdict), BLAMES);
    assert.doesNotMatch(textOf(verdict), /undefined|null|NaN/);
    const shown = verdictOf(situation(level * random(), level));
    assert.notEqual(shown.clustered, "not shown");
    assert.doesNotMatch(textOf(shown), BLAMES);
    assert.doesNotMatch(textOf(shown), shown.clustered === "clustered" ? /dispers/ : /cluster/);
  }
});

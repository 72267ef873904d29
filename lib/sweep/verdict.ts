/**
 * The answer in one paragraph of plain words, made from the numbers alone.
 *
 * The verdict never says more than the test that bounds it: the joint test over all definitions, or the
 * global test where no other definition was tried. It says what is alike or unlike, never why.
 *
 * @module
 */
import {
  aloneSentence,
  fewAreasSentence,
  steadySentence,
  whereSentence,
} from "./area_sentences.ts";
import {
  certaintySentence,
  familySentence,
  floorSentence,
  limitsSentence,
  mainAloneSentence,
  strengthSentence,
} from "./map_sentences.ts";
import { pValue } from "./phrases.ts";
import { rateSentence } from "./rate_sentence.ts";
import { definitionsTried, type Finding, type VerdictInput } from "./verdict_input.ts";

/** The paragraph: a headline, then sentences in order of weight. */
export interface Verdict {
  readonly headline: string;
  /** Each says one thing; a sentence with nothing to say is left out. */
  readonly sentences: string[];
  readonly clustered: Finding;
}

/**
 * The verdict over everything a run found.
 *
 * `clustered` and `dispersed` are said only where the bounding p is at most the level. Areas flagged on a
 * map without such a finding are reported as isolated ones.
 */
export function verdictOf(input: VerdictInput): Verdict {
  const clustered = findingOf(input);
  return {
    headline: headlineOf(input, clustered),
    sentences: sentencesOf(input, clustered),
    clustered,
  };
}

/** The joint test decides; without a sweep the global test does. */
function findingOf({ run, sweep }: VerdictInput): Finding {
  const { value, expected, p } = run.global.moranI;
  const level = run.local.level;
  if (sweep) {
    const { joint } = sweep;
    if (joint.p === null || joint.median === null || joint.p > level) return "not shown";
    return joint.median > 0 ? "clustered" : "dispersed";
  }
  if (p === null || value === null || expected === null || p > level) return "not shown";
  return value > expected ? "clustered" : "dispersed";
}

function headlineOf(input: VerdictInput, finding: Finding): string {
  const name = `"${input.run.indicator}"`;
  const basis = basisOf(input);
  if (finding === "not shown") return `No clustering of ${name} is shown (${basis})`;
  return `Values of ${name} are ${degreeOf(input, finding)} ${finding} (${basis})`;
}

/**
 * How strong, by the distance of the main definition's I from its expectation: below 0.2 `weakly`, below
 * 0.5 `moderately`, else `strongly`. A convention for reading, not a test.
 */
function degreeOf({ run }: VerdictInput, finding: Finding): string {
  const { value, expected } = run.global.moranI;
  const distance = (value ?? 0) - (expected ?? 0);
  const size = finding === "clustered" ? distance : -distance;
  if (size < 0.2) return "weakly";
  return size < 0.5 ? "moderately" : "strongly";
}

/** The test the finding rests on, in brackets behind it. */
function basisOf({ run, sweep }: VerdictInput): string {
  const { level } = run.local;
  const p = sweep ? sweep.joint.p : run.global.moranI.p;
  if (p === null) return "the test is undefined here";
  if (!sweep) return `${pValue(p, level)} with one definition of neighbor`;
  const tried = definitionsTried(sweep);
  return tried === 1
    ? `${pValue(p, level)} with one definition of neighbor`
    : `joint ${pValue(p, level)} over ${tried} definitions of neighbor`;
}

function sentencesOf(input: VerdictInput, finding: Finding): string[] {
  return [
    strengthSentence(input, finding),
    certaintySentence(input, finding),
    mainAloneSentence(input, finding),
    whereSentence(input, finding),
    steadySentence(input),
    rateSentence(input, finding),
    familySentence(input, finding),
    floorSentence(input, finding),
    aloneSentence(input),
    fewAreasSentence(input),
    limitsSentence(finding),
  ].filter((sentence) => sentence !== null);
}

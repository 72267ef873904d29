/**
 * Sentences of a verdict about single areas: where, how steady, which could not be tested.
 *
 * @module
 */
import { counted, listed } from "./phrases.ts";
import {
  definitionsTried,
  type Finding,
  type FlaggedArea,
  type VerdictInput,
} from "./verdict_input.ts";

/** Below this number of areas the verdict says that little can be found. */
const FEW_AREAS = 30;

/** Share of areas without a neighbor from which the verdict mentions them. */
const MANY_ALONE = 0.05;

/** Names given for each class; the rest is counted. */
const NAMES_SHOWN = 3;

const FLAGGED_CLASSES = ["high among high", "low among low", "high among low", "low among high"];

/** How many areas stand out under the main definition, in which classes, and a few of their names. */
export function whereSentence(input: VerdictInput, finding: Finding): string {
  const { significant, tested, level, adjust } = input.run.local;
  const byChance = Math.round(level * tested).toLocaleString("en-US");
  const areas = `testing ${counted(tested, "area")}`;
  const basis = adjust === "none"
    ? `level ${level}, not adjusted for ${areas}: about ${byChance} would by chance alone`
    : `level ${level}, adjusted for ${areas}`;
  if (significant === 0) {
    return finding === "not shown"
      ? `No single area stands out either (${basis}).`
      : `No single area stands out (${basis}), so this is a finding about the whole map and not about ` +
        "particular places.";
  }
  const verb = significant === 1 ? "stands" : "stand";
  const where = `${counted(significant, "area")} ${verb} out (${basis}): ${classList(input)}`;
  if (finding !== "not shown") return `${where}.`;
  return significant === 1
    ? `${where}; with nothing shown for the whole map, take it as a single finding to check.`
    : `${where}; with nothing shown for the whole map, take them as single findings to check one by one.`;
}

/** `12 high among high (A, B, C, and 9 more) and 3 low among low`. */
function classList({ run, flagged = [] }: VerdictInput): string {
  const { counts } = run.local;
  const present = FLAGGED_CLASSES.filter((name) => (counts[name] ?? 0) > 0);
  return listed(present.map((name) => {
    const names = steadyFirst(flagged.filter((area) => area.class === name))
      .slice(0, NAMES_SHOWN).map((area) => area.name);
    const rest = counts[name] - names.length;
    const shown = rest > 0 ? [...names, `${rest.toLocaleString("en-US")} more`] : names;
    const which = names.length === 0 ? "" : ` (${listed(shown)})`;
    return `${counted(counts[name], name, name)}${which}`;
  }));
}

/** Steady areas before the others, each in the order given: a name in a verdict should hold. */
function steadyFirst(areas: readonly FlaggedArea[]): FlaggedArea[] {
  const isSteady = ({ steady }: FlaggedArea) => steady === "steady";
  return [...areas.filter(isSteady), ...areas.filter((area) => !isSteady(area))];
}

/** How the flagged areas fare under the other definitions, and what only those find. */
export function steadySentence({ run, sweep }: VerdictInput): string | null {
  if (!sweep || definitionsTried(sweep) === 1) return null;
  const { flaggedSteady, onlyElsewhere, flips } = sweep.stability;
  const parts: string[] = [];
  if (run.local.significant > 0) parts.push(steadyPart(run.local.significant, flaggedSteady));
  if (onlyElsewhere.length > 0) {
    const verb = onlyElsewhere.length === 1 ? "stands" : "stand";
    parts.push(`${counted(onlyElsewhere.length, "area")} ${verb} out under other definitions only`);
  }
  if (flips.length > 0) {
    const has = flips.length === 1 ? "has" : "have";
    const surroundings = "high surroundings under one definition and low ones under another";
    parts.push(`${counted(flips.length, "area")} ${has} ${surroundings}`);
  }
  return parts.length === 0 ? null : `${parts.join("; ")}.`;
}

function steadyPart(significant: number, steady: number): string {
  const meaning = "steady (the same class under at least 80 % of the definitions)";
  if (significant === 1) return `That area is ${steady === 1 ? "" : "not "}${meaning}`;
  if (steady === significant) return `All of these areas are ${meaning}`;
  if (steady === 0) return `None of these areas is ${meaning}`;
  const count = steady.toLocaleString("en-US");
  return `${count} of these areas ${steady === 1 ? "is" : "are"} ${meaning}`;
}

/** How many areas have no neighbor, where they are more than a few. */
export function aloneSentence({ run }: VerdictInput): string | null {
  const alone = run.neighbors.islands;
  const all = run.local.tested + alone;
  if (alone === 0 || alone < MANY_ALONE * all) return null;
  const which = `${alone.toLocaleString("en-US")} of ${counted(all, "area")}`;
  const have = alone === 1 ? "has" : "have";
  return `${which} ${have} no neighbor in the main definition and could not be tested.`;
}

/** That few areas can show little. */
export function fewAreasSentence({ run }: VerdictInput): string | null {
  const all = run.local.tested + run.neighbors.islands;
  if (all >= FEW_AREAS) return null;
  const few = counted(all, "area");
  return `With ${few} only a strong pattern can be found, and a single area can change the answer.`;
}

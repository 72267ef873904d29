/**
 * Sentences of a verdict about the map as a whole: how strong, how sure, what would change the answer.
 *
 * Where nothing is shown they use none of the words that assert a pattern (clustered, dispersed, alike).
 *
 * @module
 */
import type { Family } from "../neighbors/rule.ts";
import { counted, pValue, statistic } from "./phrases.ts";
import type { FamilyFinding, SweepResults } from "./sweep_results.ts";
import { definitionsTried, type Finding, type VerdictInput } from "./verdict_input.ts";

/** How the map compares with chance, with the main definition's I. */
export function strengthSentence({ run }: VerdictInput, finding: Finding): string {
  const { value, expected } = run.global.moranI;
  const how = run.weights === "equal" ? "" : `, weights ${run.weights}`;
  const main = `the main definition of neighbor (${run.neighbors.rule}${how})`;
  if (value === null || expected === null) return `Moran's I is undefined with ${main}.`;
  const numbers = [
    `Moran's I is ${statistic(value)} with ${main}`,
    `where ${statistic(expected)} is expected if location plays no part`,
  ].join(", ");
  if (finding === "not shown") return `${numbers}.`;
  const degree = finding === "clustered" ? "more" : "less";
  return `Neighboring areas are ${degree} alike than chance would make them: ${numbers}.`;
}

/** What the definitions say together, or that no other was tried. */
export function certaintySentence(input: VerdictInput, finding: Finding): string {
  const { run, sweep } = input;
  const { level } = run.local;
  const side = finding === "not shown" ? "above" : "within";
  if (sweep && definitionsTried(sweep) > 1) return jointSentence(sweep, level, side);
  const { p } = run.global.moranI;
  const tried = sweep ? "could not be tried" : "were not tried";
  const open = `Other definitions of neighbor ${tried}, so whether the answer depends on that ` +
    "choice is open.";
  if (p === null) return open;
  return `The test gives ${pValue(p, level)}, ${side} the level of ${level}. ${open}`;
}

function jointSentence(sweep: SweepResults, level: number, side: string): string {
  const { p, smallest, largest } = sweep.joint;
  const tried = definitionsTried(sweep);
  if (p === null || smallest === null || largest === null) {
    return `None of the ${tried} definitions tried can tell one arrangement of the values from another.`;
  }
  const range = `I runs from ${statistic(smallest)} to ${statistic(largest)}`;
  const test = `${pValue(p, level)} (joint test), ${side} the level of ${level}`;
  return `Over the ${tried} definitions tried, ${range}; taken together they give ${test}.`;
}

/** Where the main definition by itself would have said something else. */
export function mainAloneSentence({ run, sweep }: VerdictInput, finding: Finding): string | null {
  const { value, expected, p } = run.global.moranI;
  const { level } = run.local;
  if (!sweep || definitionsTried(sweep) === 1) return null;
  if (p === null || value === null || expected === null) return null;
  const own = pValue(p, level);
  const together = "the answer rests on the definitions taken together";
  if (finding === "not shown") {
    if (p > level) return null;
    return `The main definition by itself gives ${own} and would have passed the level; the ` +
      "definitions taken together do not, so that result does not stand.";
  }
  if ((value > expected) !== (finding === "clustered")) {
    return `The main definition by itself points the other way (${own}); ${together}.`;
  }
  if (p <= level) return null;
  return `The main definition by itself gives ${own} and would not have passed the level; ${together}.`;
}

/** Which kinds of definition, taken by themselves, would have given another answer. */
export function familySentence(
  { sweep, families = [] }: VerdictInput,
  finding: Finding,
): string | null {
  if (!sweep || families.length === 0 || definitionsTried(sweep) === 1) return null;
  if (families.length === 1) {
    const kind = FAMILY_WORDS[families[0].family];
    return `All definitions tried are of one kind (${kind}); another could give another answer.`;
  }
  const passing = (family: FamilyFinding) => passingIn(family, finding);
  const mostlyPass = (family: FamilyFinding) => 2 * passing(family) >= family.definitions;
  const other = families.filter((family) => mostlyPass(family) === (finding === "not shown"));
  if (other.length === 0) {
    const share = finding === "not shown" ? "fewer than half are" : "at least half are";
    return `No kind of definition changes the answer: of each kind, ${share} within the level by themselves.`;
  }
  const named = other.map((family) =>
    `${FAMILY_WORDS[family.family]} (${passing(family)} of ${family.definitions} within the level)`
  );
  return `What would change the answer: to go by one kind of definition only, ${orListed(named)}.`;
}

const FAMILY_WORDS: Readonly<Record<Family, string>> = {
  contiguity: "shared boundaries",
  nearest: "nearest areas",
  band: "distance bands",
  graph: "graphs on the points",
  weighted: "weights by distance",
  links: "links from a file",
};

/** Definitions of a family that pass in the direction found; in the stronger one where none is. */
function passingIn({ positive, negative }: FamilyFinding, finding: Finding): number {
  if (finding === "not shown") return Math.max(positive, negative);
  return finding === "clustered" ? positive : negative;
}

function orListed(items: readonly string[]): string {
  return items.length < 2 ? items[0] : `${items.slice(0, -1).join(", ")} or ${items.at(-1)}`;
}

/** That no p could have reached the level, where too few arrangements were looked at. */
export function floorSentence({ run, sweep }: VerdictInput, finding: Finding): string | null {
  const { permutations, enumerated } = run.global.moranI;
  const { level } = run.local;
  const maps = enumerated ? permutations : (sweep?.permutations ?? permutations) + 1;
  if (finding !== "not shown" || maps < 2 || 2 / maps <= level) return null;
  const smallest = `the smallest p they can give is ${pValue(2 / maps, level).slice(4)}`;
  return enumerated
    ? `So few areas have only ${counted(maps, "arrangement")}: ${smallest}, above the level.`
    : `${counted(maps - 1, "permutation")} are too few for this level: ${smallest}.`;
}

/** What the outcome cannot tell, whatever it is. */
export function limitsSentence(finding: Finding): string {
  const boundaries = "other boundaries or larger areas could give another answer";
  return finding === "not shown"
    ? `This does not show that there is no pattern, and ${boundaries}.`
    : `The data cannot say what lies behind this, nor anything about single persons, and ${boundaries}.`;
}

/**
 * What the neighbor rules of a run mean, for readers who have never seen the grammar.
 *
 * @module
 */

/** Pattern in the text of rules, how the term is written, and who is a neighbor. */
const TERMS: readonly (readonly [pattern: RegExp, term: string, words: string])[] = [
  [/\btouching\b/, "touching", "areas that share any point of their boundaries (queen contiguity)"],
  [/\bedge\b/, "edge", "areas that share a stretch of boundary (rook contiguity)"],
  [
    /\bnearest:/,
    "nearest:K",
    "the K nearest areas; ties go to the area that comes first in the file",
  ],
  [/\bwithin:/, "within:D", "areas whose representative points lie no farther apart than D"],
  [/\btriangulated\b/, "triangulated", "areas whose points a Delaunay triangulation joins"],
  [/\bgabriel\b/, "gabriel", "no third point in the circle that has the two points as diameter"],
  [/\brelative\b/, "relative", "no third point nearer to both than they are to each other"],
  [/\bsphere\b/, "sphere", "circles to the nearest point of each area meet (sphere of influence)"],
  [/\bsame:/, "same:FIELD", "areas with the same value of a field"],
  [/\blinks:/, "links:FILE", "pairs given in a file"],
  [/\border=/, "order=N", "areas reached in exactly N steps"],
  [/\bupto=/, "upto=N", "areas reached in at most N steps"],
  [/\bmutual\b/, "mutual", "only links that go both ways"],
  [/\beither\b/, "either", "links are made to go both ways"],
  [/\bsnap=/, "snap=D", "boundaries within D of each other count as touching"],
  [
    /\bislands=nearest\b/,
    "islands=nearest",
    "areas without a neighbor are linked with the nearest",
  ],
  [/ \+ /, "A + B", "neighbors by A or by B"],
  [/ & /, "A & B", "neighbors by A and by B"],
  [/ - /, "A - B", "neighbors by A that are none by B"],
];

/** Terms that stand in any of the rules, with their meaning, in a fixed order. */
export function glossary(rules: readonly string[]): (readonly [term: string, words: string])[] {
  // File and field names in quotes are no terms.
  const text = rules.map((rule) => rule.replace(/"[^"]*"/g, '""')).join("\n");
  return TERMS.filter(([pattern]) => pattern.test(text)).map(([, term, words]) => [term, words]);
}

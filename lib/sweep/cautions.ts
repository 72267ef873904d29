/**
 * What every outcome has to carry with it, whatever its numbers say.
 *
 * @module
 */

/** One caution: a few words to scan by, and the sentence to read. */
export interface Caution {
  readonly title: string;
  readonly text: string;
}

/** The cautions of the report and the README, in the order they are printed. */
export const CAUTIONS: readonly Caution[] = [
  {
    title: "A cluster is not a cause",
    text:
      "That similar values lie side by side does not say why. Many processes, and the way data are " +
      "collected and reported, leave the same pattern.",
  },
  {
    title: "Areas are not persons",
    text: "A finding about areas does not carry over to the people in them (ecological fallacy).",
  },
  {
    title: "Shape and scale matter",
    text:
      "Results depend on where the boundaries run and how large the areas are. The same events " +
      "counted in other areas may give another map.",
  },
  {
    title: "Small numbers mislead",
    text:
      "Rates and shares of small populations swing widely by chance alone, and so do the areas that " +
      "stand out.",
  },
  {
    title: "Small numbers can identify people",
    text:
      "Follow the disclosure rules of the owner of the data before passing on values, maps or tables.",
  },
  {
    title: "Have it reviewed",
    text:
      "Where findings steer health, safety, policing or money, have them reviewed by a qualified " +
      "statistician or epidemiologist and follow local rules.",
  },
];

/**
 * Where the option reference stands in the README.
 *
 * @module
 */
import { referenceText } from "../../cli/reference.ts";

const START = "<!-- reference: made from cli/option_table.ts -->";
const END = "<!-- end of reference -->";

/** The README with its reference made anew. */
export function withReference(readme: string): string {
  const [before, rest] = readme.split(START);
  const [, after] = rest.split(END);
  return `${before}${START}\n\n${referenceText()}\n\n${END}${after}`;
}

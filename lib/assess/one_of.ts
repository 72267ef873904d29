/**
 * Words that an option may be.
 *
 * @module
 */
import { UsageError } from "../layer/errors.ts";

/** The word itself when it is one of `words`; a usage error that lists them otherwise. */
export function oneOf<const Word extends string>(
  option: string,
  word: string,
  words: readonly Word[],
): Word {
  const known = words.find((candidate) => candidate === word);
  if (known !== undefined) return known;
  throw new UsageError(`Cannot use ${option} ${word}; choose one of ${words.join(", ")}`);
}

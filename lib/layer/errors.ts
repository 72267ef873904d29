/**
 * The faults a user can mend, one class for each exit code of the command line.
 *
 * Every message is one sentence without a full stop that names the thing, gives both sides and
 * says what to do. Anything else that is thrown is a fault of the program.
 *
 * @module
 */

/** The question itself is malformed: an unknown option value, field or rule (exit code 2). */
export class UsageError extends Error {
  override readonly name: string = "UsageError";
}

/** An input file is missing, foreign, ambiguous or broken (exit code 3). */
export class UnreadableError extends Error {
  override readonly name: string = "UnreadableError";
}

/** The data were read but cannot answer the question asked (exit code 4). */
export class UnfitDataError extends Error {
  override readonly name: string = "UnfitDataError";
}

/** The outcome cannot be written, or would overwrite something (exit code 5). */
export class UnwritableError extends Error {
  override readonly name: string = "UnwritableError";
}

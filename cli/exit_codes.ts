/**
 * What the process says when it ends. 124 to 127 and 137 stay free for shells and schedulers.
 *
 * @module
 */
import {
  UnfitDataError,
  UnreadableError,
  UnwritableError,
  UsageError,
} from "../lib/layer/errors.ts";

/** Exit codes by name. */
export const EXIT = {
  done: 0,
  faultOfTheProgram: 1,
  usage: 2,
  cannotRead: 3,
  dataUnfit: 4,
  cannotWrite: 5,
  interrupted: 130,
} as const;

/** The exit code for anything thrown. */
export function exitCodeOf(error: unknown): number {
  if (error instanceof UsageError) return EXIT.usage;
  if (error instanceof UnreadableError) return EXIT.cannotRead;
  if (error instanceof UnfitDataError) return EXIT.dataUnfit;
  if (error instanceof UnwritableError) return EXIT.cannotWrite;
  if (error instanceof DOMException && error.name === "AbortError") return EXIT.interrupted;
  return EXIT.faultOfTheProgram;
}

/**
 * The values of a range such as `4..12` or `2km..20km/10`.
 *
 * @module
 */
import { UsageError } from "../layer/errors.ts";
import { parseLength } from "../project/length.ts";

/** Most values that one range may hold. */
const MOST = 1000;

/**
 * The values that a piece of a list stands for, as texts; a piece without `..` stands for itself.
 *
 * @param lengths Whether the values are lengths with a unit (then a range needs its `/count`).
 * @throws {UsageError} when the range is empty, does not go up, or cannot be cut as asked.
 */
export function rangeValues(piece: string, lengths: boolean): string[] {
  const match = /^(.*?)\.\.(.*?)(?:\/(.*))?$/.exec(piece);
  if (!match) return [piece];
  const [, from, to, cuts] = match;
  if (from === "" || to === "") {
    throw new UsageError(`Cannot read the range "${piece}", which lacks an end, as in 4..12`);
  }
  const count = cuts === undefined ? undefined : countOf(piece, cuts);
  return lengths ? lengthRange(piece, from, to, count) : countRange(piece, from, to, count);
}

function countOf(piece: string, cuts: string): number {
  const count = /^\d{1,4}$/.test(cuts) ? Number(cuts) : 0;
  if (count >= 2 && count <= MOST) return count;
  throw new UsageError(
    `Cannot take ${
      cuts || "no"
    } values of the range "${piece}"; give a whole number from 2 to ${MOST}`,
  );
}

function countRange(piece: string, from: string, to: string, count: number | undefined): string[] {
  const [first, last] = [from, to].map((text) => /^\d{1,9}$/.test(text) ? Number(text) : 0);
  if (first < 1 || last < 1) {
    throw new UsageError(`Cannot read the range "${piece}"; write whole numbers, as in 4..12`);
  }
  if (last < first) throw notUp(piece, from, to);
  const many = count ?? last - first + 1;
  if (many > MOST) throw new UsageError(`Cannot take all ${many} values of the range "${piece}"`);
  const step = many === 1 ? 0 : (last - first) / (many - 1);
  if (!Number.isInteger(step) || (step === 0 && many > 1)) {
    throw new UsageError(
      `Cannot take ${many} whole numbers at equal steps from the range "${piece}"`,
    );
  }
  return Array.from({ length: many }, (_, v) => String(first + v * step));
}

/** Values in the unit of the far end, rounded to 12 digits so that `0.1km` is not `0.10000000000000002km`. */
function lengthRange(piece: string, from: string, to: string, count: number | undefined): string[] {
  const ends = [parseLength(from), parseLength(to)].map(({ meters }) => meters);
  if (count === undefined) {
    throw new UsageError(
      `Cannot step through the range "${piece}" without the number of values, as in ${piece}/10`,
    );
  }
  if (ends[1] <= ends[0]) throw notUp(piece, from, to);
  const unit = parseLength(to).text.replace(/^.*\d\.?/, "");
  const [first, last] = ends.map((meters) => meters / parseLength(`1${unit}`).meters);
  const step = (last - first) / (count - 1);
  return Array.from({ length: count }, (_, v) => `${rounded(first + v * step)}${unit}`);
}

function rounded(value: number): number {
  return Number(value.toPrecision(12));
}

function notUp(piece: string, from: string, to: string): UsageError {
  return new UsageError(
    `Cannot run the range "${piece}" from ${from} to ${to}, which does not go up`,
  );
}

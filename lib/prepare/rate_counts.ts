/**
 * Cases and population as they were published, checked before anything is divided.
 *
 * @module
 */
import { UnfitDataError } from "../layer/errors.ts";
import type { ColumnNumbers } from "./numbers.ts";

/** A field of a rate with its name. */
export interface RateField {
  readonly name: string;
  readonly numbers: ColumnNumbers;
}

/** Both fields of a rate, sorted out row by row. */
export interface CheckedCounts {
  /** One per row: null where both numbers can be used, else why not. */
  readonly reasons: readonly (string | null)[];
  /** Sentences on rows that look wrong. */
  readonly notes: readonly string[];
}

/** Options of {@link checkCounts}. */
export interface CountOptions {
  /** Whether nobody counts twice, so that cases cannot exceed the population. @default false */
  readonly share?: boolean;
}

/**
 * Decides which rows have a rate. A row without cases or without a population is left out and says which; so is a
 * population of 0, pointed out where it has cases.
 *
 * @throws {UnfitDataError} for a negative population, for cases that are negative or no whole number, and for a share for
 * cases above the population or a population that is no whole number: these are faults of the file, or the wrong
 * field.
 */
export function checkCounts(
  cases: RateField,
  population: RateField,
  { share = false }: CountOptions = {},
): CheckedCounts {
  const count = cases.numbers.values, size = population.numbers.values;
  checkRows(
    cases,
    (value) => value >= 0 && Number.isInteger(value),
    "a count is 0 or more and whole",
  );
  checkRows(population, (value) => value >= 0, "a population is 0 or more");
  const reasons = cases.numbers.reasons.map((reason, row) => {
    if (reason !== null) return `${cases.name}: ${reason}`;
    const other = population.numbers.reasons[row];
    if (other !== null) return `${population.name}: ${other}`;
    return size[row] === 0 ? `${population.name}: population is 0` : null;
  });
  if (share) checkShare(cases, population);
  const strange = count.filter((value, row) => value > 0 && size[row] === 0).length;
  const notes = strange === 0 ? [] : [
    `${strange} of the areas left out for a population of 0 in ${population.name} have cases in ${cases.name}`,
  ];
  return { reasons, notes };
}

function checkRows(
  { name, numbers }: RateField,
  isFit: (value: number) => boolean,
  rule: string,
): void {
  const row = numbers.values.findIndex((value) => !Number.isNaN(value) && !isFit(value));
  if (row < 0) return;
  throw new UnfitDataError(
    `Cannot make a rate with field ${name} as row ${row + 1} (_row ${row}) holds ${
      numbers.values[row]
    } and ${rule}; mend it or leave the area out with --where`,
  );
}

function checkShare(cases: RateField, population: RateField): void {
  checkRows(population, Number.isInteger, "the population of a share is whole");
  const count = cases.numbers.values, size = population.numbers.values;
  const row = count.findIndex((value, row) => value > size[row]);
  if (row < 0) return;
  throw new UnfitDataError(
    `Cannot make a share as row ${row + 1} (_row ${row}) has ${
      count[row]
    } cases (${cases.name}) in a population of ${
      size[row]
    } (${population.name}); leave out --share where one can count twice, or mend the fields`,
  );
}

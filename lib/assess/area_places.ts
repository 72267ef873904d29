/**
 * Where each area is taken to lie.
 *
 * @module
 */
import { readColumn } from "../layer/column.ts";
import { UsageError } from "../layer/errors.ts";
import type { Layer } from "../layer/layer.ts";

/** Two fields that hold a point for each area. */
export type PointFields = readonly [x: string, y: string];

/**
 * Reads `X,Y`, the two fields of points that somebody chose: centers of population, seats.
 *
 * @throws {UsageError} for anything but two names.
 */
export function parsePointFields(text: string): PointFields {
  const names = text.split(",").map((name) => name.trim());
  if (names.length === 2 && names.every((name) => name !== "")) return [names[0], names[1]];
  throw new UsageError(`Cannot use --points ${text}; name two fields, as in --points lon,lat`);
}

/**
 * The points that two number fields hold for some rows, in the layer's own coordinates; NaN where one is missing.
 *
 * @throws {UsageError} for fields that are unknown or hold no numbers.
 */
export function givenPlaces(
  layer: Layer,
  rows: Uint32Array,
  fields: PointFields,
): Float64Array {
  const places = new Float64Array(2 * rows.length);
  fields.forEach((field, axis) => {
    const { values } = readColumn(layer, field);
    if (!(values instanceof Float64Array)) {
      throw new UsageError(`Cannot take points from the field ${field} as it holds no numbers`);
    }
    rows.forEach((row, at) => places[2 * at + axis] = values[row]);
  });
  for (let at = 0; at < places.length; at += 2) {
    if (Number.isNaN(places[at] + places[at + 1])) places.fill(NaN, at, at + 2);
  }
  return places;
}

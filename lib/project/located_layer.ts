/**
 * A layer whose place on Earth is known.
 *
 * @module
 */
import { UnfitDataError } from "../layer/errors.ts";
import { boundsOf } from "../layer/geometry.ts";
import type { Crs, Layer } from "../layer/layer.ts";
import { type Extent, extentOf } from "./extent.ts";
import { openProjection, type Projection } from "./projection.ts";

/** The parts of a layer that a metric is chosen by. */
export type MetricLayer = Pick<Layer, "name" | "geometry" | "crs">;

/** A layer with its CRS opened. */
export interface LocatedLayer {
  /** What to call it in messages. */
  readonly name: string;
  /** The CRS it declares. */
  readonly crs: Crs;
  /** The same, opened. */
  readonly projection: Projection;
  /** Where its vertices lie. */
  readonly extent: Extent;
}

/**
 * Finds where on Earth a layer lies.
 *
 * @throws {UnfitDataError} when it declares no CRS, one that proj4 cannot read, or one that its
 * coordinates do not fit, or when it has no coordinates. Cost: a pass or two over the vertices.
 */
export function locate({ name, geometry, crs }: MetricLayer): LocatedLayer {
  if (crs === null) {
    throw new UnfitDataError(
      `Cannot measure distances in ${name} as it declares no coordinate reference system; ` +
        "pass --crs EPSG:N, or --metric planar to use its own units",
    );
  }
  const projection = openProjection(crs.wkt);
  if (projection === null) {
    throw new UnfitDataError(
      `Cannot compute with ${crs.name}, the coordinate reference system of ${name}; pass --metric ` +
        "planar if its own units are true on the ground, or reproject the layer first",
    );
  }
  const bounds = boundsOf(geometry);
  if (bounds === null) {
    throw new UnfitDataError(
      `Cannot measure distances in ${name} as none of its features has a geometry`,
    );
  }
  const [west, south, east, north] = bounds;
  const isPossible = !projection.geographic ||
    (west >= -360 && east <= 360 && south >= -90 && north <= 90);
  const extent = isPossible ? extentOf(geometry, projection) : null;
  if (extent !== null) return { name, crs, projection, extent };
  throw new UnfitDataError(
    `The coordinates of ${name}, from ${west}, ${south} to ${east}, ${north}, do not fit the coordinate ` +
      `reference system it declares, ${crs.name}; correct that, or pass --metric planar`,
  );
}

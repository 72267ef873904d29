/**
 * What terms are made from, each computed when first asked for and then kept.
 *
 * @module
 */
import { UnfitDataError, UsageError } from "../layer/errors.ts";
import type { Length } from "../project/length.ts";
import { type Contiguity, type ContiguityFinder, contiguityFinder } from "./contiguity.ts";
import type { Ground } from "./ground.ts";
import { linksTopology } from "./links.ts";
import { once } from "./once.ts";
import { openSpace } from "./open_space.ts";
import type { PointSpace } from "./point_space.ts";
import { restrict } from "./restrict.ts";
import { linkSame } from "./same.ts";
import type { Topology } from "./topology.ts";

/** Doors to the data of a ground; those over all kept areas go through `amongUsable`. */
export interface Sources {
  /** Takes the unusable areas out of a topology over all kept ones. */
  readonly amongUsable: (topology: Topology) => Topology;
  /** Shared boundaries of all kept areas. */
  readonly contiguity: (snap: Length | null) => Contiguity;
  /** Links of a file, over all kept areas. */
  readonly links: (file: string) => Topology;
  /** Blocks of a field, over all kept areas. */
  readonly blocks: (field: string) => Topology;
  /** Distance between the usable areas. */
  readonly space: () => PointSpace;
}

/**
 * Opens the doors of a ground.
 *
 * @throws {UsageError} from a door whose data the ground lacks.
 */
export function groundSources(ground: Ground): Sources {
  const contiguity = once(() => contiguityOf(ground));
  return {
    amongUsable: (topology) => restrict(topology, ground.usable),
    contiguity: (snap) => contiguity().find(snap),
    links: (file) => {
      if (ground.readLinks) return linksTopology(ground.count, ground.readLinks(file));
      throw new UsageError(`Cannot read the links of ${file} as this ground has no link files`);
    },
    blocks: (field) => {
      if (ground.fieldKeys) return linkSame(ground.fieldKeys(field), field);
      throw new UsageError(`Cannot link areas with the same ${field} as this ground has no fields`);
    },
    space: once(() => spaceOf(ground)),
  };
}

function contiguityOf(ground: Ground): ContiguityFinder {
  if (ground.contiguity) return ground.contiguity;
  if (ground.geometry) return contiguityFinder(ground.geometry, ground);
  throw new UsageError("Cannot find shared boundaries as this ground has no geometry");
}

function spaceOf({ space, points, usable, ellipsoid }: Ground): PointSpace {
  if (space) return space;
  if (points) return openSpace(points.filter((_, at) => usable[at >> 1] === 1), ellipsoid);
  throw new UnfitDataError(
    "Cannot measure distance as the layer has no coordinate reference system that allows it; " +
      'choose one with --metric, or "--metric planar" for map units',
  );
}

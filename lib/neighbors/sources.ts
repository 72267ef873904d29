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
import { nearestFinder, type NearestLinks } from "./nearest.ts";
import { once } from "./once.ts";
import { pointGraphFinder } from "./point_graph.ts";
import { indexPoints, type PointIndex } from "./point_index.ts";
import { positionsOf, restrict } from "./restrict.ts";
import { roundPoints } from "./rounded_points.ts";
import type { PointGraph } from "./rule_tree.ts";
import { linkSame } from "./same.ts";
import type { Topology } from "./topology.ts";

/** Doors to the data of a ground; those over all kept areas go through `amongUsable`. */
export interface Sources {
  /** Number of usable areas. */
  readonly usable: number;
  /** Takes the unusable areas out of a topology over all kept ones. */
  readonly amongUsable: (topology: Topology) => Topology;
  /** Shared boundaries of all kept areas. */
  readonly contiguity: (snap: Length | null) => Contiguity;
  /** Links of a file, over all kept areas. */
  readonly links: (file: string) => Topology;
  /** Blocks of a field, over all kept areas. */
  readonly blocks: (field: string) => Topology;
  /** Points of the usable areas. */
  readonly index: () => PointIndex;
  /** Nearest usable areas. */
  readonly nearest: (count: number) => NearestLinks;
  /** Graphs on the points of the usable areas. */
  readonly pointGraph: (kind: PointGraph["kind"]) => Topology;
}

/**
 * Opens the doors of a ground.
 *
 * @throws {UsageError} from a door whose data the ground lacks.
 */
export function groundSources(ground: Ground): Sources {
  const places = positionsOf(ground.usable);
  const points = once(() => roundPoints(pointsOf(ground, places)));
  const index = once(() => indexPoints(points()));
  const nearest = once(() => nearestFinder(index(), places.length));
  const pointGraph = once(() => pointGraphFinder(points()));
  const contiguity = once(() => contiguityOf(ground));
  return {
    usable: places.length,
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
    index,
    nearest: (count) => nearest()(count),
    pointGraph: (kind) => pointGraph()(kind),
  };
}

function contiguityOf(ground: Ground): ContiguityFinder {
  if (ground.contiguity) return ground.contiguity;
  if (ground.geometry) return contiguityFinder(ground.geometry, ground);
  throw new UsageError("Cannot find shared boundaries as this ground has no geometry");
}

function pointsOf({ points }: Ground, places: Uint32Array): Float64Array {
  if (points === null) {
    throw new UnfitDataError(
      "Cannot measure distance as the layer has no coordinate reference system that allows it; " +
        'choose one with --metric, or "--metric planar" for map units',
    );
  }
  const picked = new Float64Array(2 * places.length);
  places.forEach((place, at) => {
    picked[2 * at] = points[2 * place];
    picked[2 * at + 1] = points[2 * place + 1];
  });
  return picked;
}

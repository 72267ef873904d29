/**
 * The weights of North Carolina's 100 counties that the reference cases name, built the slow and obvious way.
 *
 * @module
 */
import type { Weights } from "../../lib/weights/weights.ts";
import {
  numberColumn,
  referenceText,
  rowStandardized,
  textColumn,
  weightsOfListFile,
  weightsOfMatrix,
} from "./reference.ts";

/** Weights by the name that the cases give them, areas in the order of `nc.csv`. */
export function ncWeights(name: string): Weights {
  const scaled = name.match(/^(.*)_(row|unscaled)$/);
  if (!scaled) throw new Error(`No weights called ${name}`);
  const raw = unscaled(scaled[1]);
  return scaled[2] === "row" ? rowStandardized(raw) : raw;
}

function unscaled(rule: string): Weights {
  switch (rule) {
    case "queen":
      return sharedVertices(1);
    case "rook":
      return sharedVertices(2);
    case "cressie_chan":
      return weightsOfListFile(
        "nc_neighbours_cressie_chan_1989.json",
        textColumn("nc.csv", "CNTY_ID"),
      );
    case "band30":
      return betweenSeats((d) => d <= 30 ? 1 : 0);
    case "invd1_60mi":
      return betweenSeats((d) => d <= 60 ? 1 / d : 0);
    case "invd2_60mi":
      return betweenSeats((d) => d <= 60 ? 1 / d ** 2 : 0);
    case "bisquare_40":
      return betweenSeats((d) => d < 40 ? (1 - (d / 40) ** 2) ** 2 : 0);
    case "epanechnikov_40":
      return betweenSeats((d) => d < 40 ? 1 - (d / 40) ** 2 : 0);
    case "gauss_h25_cut60":
      return betweenSeats((d) => d <= 60 ? Math.exp(-0.5 * (d / 25) ** 2) : 0);
    case "knn4_centroid":
      return fourNearestCentroids();
    default:
      throw new Error(`No weights called ${rule}`);
  }
}

/** Counties that have at least `fewest` boundary vertices in common: one for a point, two for an edge. */
function sharedVertices(fewest: number): Weights {
  const { features } = JSON.parse(referenceText("nc.geojson"));
  const byName = new Map<string, Set<string>>();
  for (const { properties, geometry } of features) {
    byName.set(properties.NAME, new Set(geometry.coordinates.flat(2).map(String)));
  }
  const vertices = textColumn("nc.csv", "NAME").map((name) => byName.get(name)!);
  const common = (a: Set<string>, b: Set<string>) =>
    [...a].filter((vertex) => b.has(vertex)).length;
  return weightsOfMatrix(
    vertices.map((a, i) => vertices.map((b, j) => i !== j && common(a, b) >= fewest ? 1 : 0)),
  );
}

/** Weights by the distance between county seats in miles; never to itself. */
function betweenSeats(weightAt: (miles: number) => number): Weights {
  const east = numberColumn("nc_points.csv", "seat_east_miles");
  const north = numberColumn("nc_points.csv", "seat_north_miles");
  return weightsOfMatrix(
    Array.from(
      east,
      (_, i) =>
        Array.from(
          east,
          (_, j) => i === j ? 0 : weightAt(Math.hypot(east[i] - east[j], north[i] - north[j])),
        ),
    ),
  );
}

/** The four counties with the nearest centroids, measured in degrees as the case does. */
function fourNearestCentroids(): Weights {
  const lon = numberColumn("nc_points.csv", "centroid_lon");
  const lat = numberColumn("nc_points.csv", "centroid_lat");
  return weightsOfMatrix(Array.from(lon, (_, i) => {
    const squares = Array.from(lon, (_, j) => (lon[i] - lon[j]) ** 2 + (lat[i] - lat[j]) ** 2);
    const nearest = [...squares.keys()].filter((j) => j !== i).sort((a, b) =>
      squares[a] - squares[b]
    );
    const row = new Array<number>(lon.length).fill(0);
    for (const j of nearest.slice(0, 4)) row[j] = 1;
    return row;
  }));
}

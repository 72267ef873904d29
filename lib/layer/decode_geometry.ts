/**
 * From the geometry inside FlatGeobuf features to flat arrays.
 *
 * A geometry table holds its vertices itself (`xy`, and `ends` where there are several rings or lines) or
 * is made of member tables (`parts`). Tables that hold vertices are called leaves here.
 *
 * @module
 */
import { fieldAt, follow, vectorLength, vectorStart, viewOf } from "./flat_table.ts";
import type { FlatGeometry } from "./geometry.ts";

/** Geometries decoded from a file. */
export interface DecodedGeometry {
  readonly geometry: FlatGeometry;
  /** The format's type number of each feature, 0 where it has no geometry; length n. */
  readonly types: Uint8Array;
}

/** Slots of the format's `Feature` and `Geometry` tables. */
const SLOT = { geometry: 4, ends: 4, xy: 6, type: 16, parts: 18 } as const;

/** The format's type numbers with a meaning of their own here. */
const POLYGON_TYPE = 3;
const POLYGON_COLLECTIONS: ReadonlySet<number> = new Set([6, 15, 16]);

/** Indices into `GEOMETRY_KINDS`, and the kind of each simple type of the format. */
const NONE = 0, POINT = 1, LINE = 2, POLYGON = 3;
const KIND_OF_TYPE: readonly number[] = [NONE, POINT, LINE, POLYGON, POINT, LINE];
const TRIANGLE_TYPE = 17;

/** Positions of the leaves of all features. */
interface Leaves {
  /** Kind of each feature. */
  readonly kinds: Uint8Array;
  readonly types: Uint8Array;
  /** First leaf of each feature, length n + 1. */
  readonly starts: Uint32Array;
  /** Position of each leaf's table. */
  readonly at: readonly number[];
}

/**
 * Decodes the geometry of every feature.
 *
 * A multi-geometry becomes one part a member. A collection keeps its members of the highest dimension
 * (polygons before lines before points). A geometry with a coordinate that is not finite counts as none,
 * as does an empty one. Z and M are passed over.
 *
 * @param featureStarts Byte offset of each feature's size prefix, length n + 1.
 * @param layerType Type that the header gives to features which name none.
 *
 * Cost: a pass over the coordinates to check, one to copy; 100,000 polygons in about 0.1 s.
 */
export function decodeGeometry(
  fgb: Uint8Array,
  featureStarts: Float64Array,
  layerType: number,
): DecodedGeometry {
  const view = viewOf(fgb);
  const leaves = findLeaves(view, featureStarts, layerType);
  return { geometry: fill(fgb, view, leaves), types: leaves.types };
}

function findLeaves(view: DataView, featureStarts: Float64Array, layerType: number): Leaves {
  const count = featureStarts.length - 1;
  const kinds = new Uint8Array(count);
  const types = new Uint8Array(count);
  const starts = new Uint32Array(count + 1);
  const at: number[] = [];
  for (let row = 0; row < count; row++) {
    const field = fieldAt(view, follow(view, featureStarts[row] + 4), SLOT.geometry);
    if (field !== 0) {
      const table = follow(view, field);
      types[row] = typeOf(view, table) || layerType;
      kinds[row] = collectLeaves(view, table, types[row], at);
      if (!allFinite(view, at, starts[row])) {
        kinds[row] = NONE;
        at.length = starts[row];
      }
    }
    starts[row + 1] = at.length;
  }
  return { kinds, types, starts, at };
}

function typeOf(view: DataView, table: number): number {
  const field = fieldAt(view, table, SLOT.type);
  return field === 0 ? 0 : view.getUint8(field);
}

/** Appends the leaves of one geometry to `at`, only those of its highest dimension, which it returns. */
function collectLeaves(view: DataView, table: number, type: number, at: number[]): number {
  const members = fieldAt(view, table, SLOT.parts);
  const memberCount = vectorLength(view, members);
  if (memberCount === 0) {
    const kind = type === TRIANGLE_TYPE ? POLYGON : KIND_OF_TYPE[type] ?? NONE;
    const hasVertices = vectorLength(view, fieldAt(view, table, SLOT.xy)) > 0;
    if (kind === NONE || !hasVertices) return NONE;
    at.push(table);
    return kind;
  }
  const first = vectorStart(view, members);
  const memberType = POLYGON_COLLECTIONS.has(type) ? POLYGON_TYPE : 0;
  const kept = at.length;
  let highest = NONE;
  for (let m = 0; m < memberCount; m++) {
    const before = at.length;
    const member = follow(view, first + 4 * m);
    const kind = collectLeaves(view, member, typeOf(view, member) || memberType, at);
    if (kind > highest) {
      at.splice(kept, before - kept);
      highest = kind;
    } else if (kind < highest) {
      at.length = before;
    }
  }
  return highest;
}

function allFinite(view: DataView, at: readonly number[], from: number): boolean {
  for (let leaf = from; leaf < at.length; leaf++) {
    const field = fieldAt(view, at[leaf], SLOT.xy);
    const start = vectorStart(view, field);
    const end = start + 8 * vectorLength(view, field);
    for (let p = start; p < end; p += 8) {
      const value = view.getFloat64(p, true);
      // Infinity - Infinity and NaN - NaN are both NaN.
      if (value - value !== 0) return false;
    }
  }
  return true;
}

function fill(fgb: Uint8Array, view: DataView, leaves: Leaves): FlatGeometry {
  const { kinds, starts, at } = leaves;
  const geometry = allocate(view, leaves);
  const { partStarts, ringStarts, vertexStarts, xy } = geometry;
  const xyBytes = new Uint8Array(xy.buffer);
  let part = 0, ring = 0, vertex = 0;
  for (let row = 0; row < kinds.length; row++) {
    for (let leaf = starts[row]; leaf < starts[row + 1]; leaf++) {
      const vertices = fieldAt(view, at[leaf], SLOT.xy);
      const source = vectorStart(view, vertices);
      const length = vectorLength(view, vertices) >> 1;
      // Copied as bytes: coordinates need not be aligned within the file.
      xyBytes.set(fgb.subarray(source, source + 16 * length), 16 * vertex);
      const rings = ringCount(view, at[leaf], kinds[row], length);
      const ends = fieldAt(view, at[leaf], SLOT.ends);
      for (let r = 0; r < rings; r++) {
        if (r === 0 || kinds[row] !== POLYGON) ringStarts[part++] = ring;
        ring++;
        vertexStarts[ring] = vertex + ringEnd(view, kinds[row], ends, r, length);
      }
      vertex += length;
    }
    partStarts[row + 1] = part;
  }
  ringStarts[part] = ring;
  return geometry;
}

/** Points: one ring a vertex. Lines and polygons: one for each of `ends`, which a single one may lack. */
function ringCount(view: DataView, table: number, kind: number, vertices: number): number {
  if (kind === POINT) return vertices;
  return Math.max(1, vectorLength(view, fieldAt(view, table, SLOT.ends)));
}

/** Vertices of the leaf up to the end of its ring r. */
function ringEnd(view: DataView, kind: number, ends: number, r: number, vertices: number): number {
  if (kind === POINT) return r + 1;
  if (vectorLength(view, ends) === 0) return vertices;
  return view.getUint32(vectorStart(view, ends) + 4 * r, true);
}

function allocate(view: DataView, { kinds, starts, at }: Leaves): FlatGeometry {
  let parts = 0, rings = 0, vertices = 0;
  for (let row = 0; row < kinds.length; row++) {
    for (let leaf = starts[row]; leaf < starts[row + 1]; leaf++) {
      const length = vectorLength(view, fieldAt(view, at[leaf], SLOT.xy)) >> 1;
      const ringsHere = ringCount(view, at[leaf], kinds[row], length);
      parts += kinds[row] === POLYGON ? 1 : ringsHere;
      rings += ringsHere;
      vertices += length;
    }
  }
  return {
    kinds,
    partStarts: new Uint32Array(kinds.length + 1),
    ringStarts: new Uint32Array(parts + 1),
    vertexStarts: new Uint32Array(rings + 1),
    xy: new Float64Array(2 * vertices),
  };
}

/**
 * The areas of a class map as SVG, one group for each way of drawing.
 *
 * @module
 */
import { GEOMETRY_KINDS } from "../layer/geometry.ts";
import { CLASS_LOOKS, FRAGILE_STRENGTH, isFlagged, isFragile } from "../write/class_looks.ts";
import type { AreaClass } from "../write/results.ts";
import { areaTooltip } from "./area_tooltip.ts";
import { classFill } from "./hatches.ts";
import { type MapFrame, UNITS } from "./map_frame.ts";
import { addShape } from "./map_shapes.ts";
import { type Markup, markup, trusted } from "./markup.ts";
import { relativePath } from "./relative_path.ts";
import type { ReportInput } from "./report_input.ts";
import { short } from "./svg.ts";

/** Name of the class map, with which its ids begin. */
export const MAP_NAME = "class-map";

/** Layers with more areas than this get no element for each area with a tooltip. */
const MOST_WITH_TOOLTIP = 3000;
/** Their areas are merged so many into a path: few elements, yet browsers need not redraw all for a part. */
const MERGED = 1000;

/** From the back to the front. */
const DRAWING_ORDER: readonly AreaClass[] = [
  "no value",
  "alone",
  "no evidence",
  "low among low",
  "high among high",
  "low among high",
  "high among low",
];

/** Kind of a drawn feature. */
export type ShapeKind = "polygon" | "line" | "point";

/** Areas that are drawn alike. */
export interface MapGroup {
  readonly name: AreaClass;
  readonly fragile: boolean;
  readonly kind: ShapeKind;
  readonly rows: readonly number[];
}

/** All areas that have a shape, gathered by how they are drawn, from the back to the front. */
export function mapGroups({ areas, geometry }: ReportInput): MapGroup[] {
  const rows = new Map<string, number[]>();
  for (let row = 0; row < geometry.kinds.length; row++) {
    const kind = GEOMETRY_KINDS[geometry.kinds[row]];
    if (kind === "none") continue;
    const key = keyOf(kind, areas.class[row], isFragile(areas.steady?.[row]));
    const known = rows.get(key);
    if (known) known.push(row);
    else rows.set(key, [row]);
  }
  // Fragile areas come last of all, so that no neighbor covers their dashed outline.
  return [false, true].flatMap((fragile) =>
    DRAWING_ORDER.flatMap((name) =>
      (["polygon", "line", "point"] as const).map((kind) => ({
        name,
        fragile,
        kind,
        rows: rows.get(keyOf(kind, name, fragile)) ?? [],
      }))
    )
  ).filter((group) => group.rows.length > 0);
}

function keyOf(kind: ShapeKind, name: AreaClass, fragile: boolean): string {
  return `${kind} ${name} ${fragile}`;
}

/** Sizes of what is drawn, in map units. */
export interface MapSizes {
  /** Width of outlines; 0 where areas are too many and too small to be told apart by them. */
  readonly outline: number;
  readonly radius: number;
  readonly tile: number;
}

/** Areas with less room than this, as the side of a square in map units, are drawn without outlines. */
const LEAST_OUTLINED = 10;

/** Thinner outlines and smaller marks and hatches where areas are many. */
export function mapSizes(frame: MapFrame, count: number): MapSizes {
  const spacing = UNITS * Math.sqrt(frame.width * frame.height / count);
  const between = (low: number, share: number, high: number) =>
    Math.min(high, Math.max(low, share * spacing));
  return {
    outline: spacing < LEAST_OUTLINED ? 0 : short(between(0.2, 0.05, 1.6)),
    radius: between(4, 0.17, 13),
    tile: between(9, 0.2, 14),
  };
}

/** A group with all its areas, in map units. */
export function drawGroup(
  input: ReportInput,
  group: MapGroup,
  { frame, sizes }: { readonly frame: MapFrame; readonly sizes: MapSizes },
): Markup {
  const { name, rows } = group;
  const pathOf = (some: readonly number[]) => {
    const path = relativePath();
    for (const row of some) addShape(path, frame, row, { name, radius: sizes.radius });
    return trusted(path.text());
  };
  const paths = input.areas.class.length <= MOST_WITH_TOOLTIP
    ? rows.map((row) =>
      markup`<path d="${pathOf([row])}"><title>${areaTooltip(input, row)}</title></path>`
    )
    : chunks(rows, MERGED).map((some) => markup`<path d="${pathOf(some)}"/>`);
  return markup`<g ${groupStyle(group, sizes)}>${paths}</g>
`;
}

function chunks(rows: readonly number[], size: number): (readonly number[])[] {
  const count = Math.ceil(rows.length / size);
  return Array.from({ length: count }, (_, i) => rows.slice(i * size, (i + 1) * size));
}

/** Attributes of a group. */
export function groupStyle(group: Omit<MapGroup, "rows">, sizes: MapSizes): Markup {
  if (group.kind === "polygon") return polygonStyle(group, sizes);
  return group.kind === "line" ? lineStyle(group) : pointStyle(group);
}

function polygonStyle({ name, fragile }: Omit<MapGroup, "rows">, { outline }: MapSizes): Markup {
  const { ink, hatch } = CLASS_LOOKS[name];
  const fill = classFill(MAP_NAME, name);
  if (fragile) {
    return markup`fill="${fill}" fill-opacity="${FRAGILE_STRENGTH}" ${
      dashed(ink, Math.max(outline, 0.8) * 1.5)
    }`;
  }
  // Without outlines, soft edges would leave light seams between neighbors.
  if (outline === 0) return markup`fill="${fill}" shape-rendering="crispEdges"`;
  // White areas need an outline that is not white.
  const isBlank = hatch === "dots" || hatch === "cross";
  return markup`fill="${fill}" stroke="${
    isBlank ? ink : "#FFFFFF"
  }" stroke-width="${outline}" stroke-linejoin="round"`;
}

function pointStyle({ name, fragile }: Omit<MapGroup, "rows">): Markup {
  const { ink, fill } = CLASS_LOOKS[name];
  const inside = isFaint(name) ? ink : fill;
  if (fragile) {
    return markup`fill="${inside}" fill-opacity="${FRAGILE_STRENGTH}" ${dashed(ink, 1.6)}`;
  }
  const outline = isFlagged(name) || name === "alone" ? ink : "#FFFFFF";
  return markup`fill="${inside}" stroke="${outline}" stroke-width="1.4"`;
}

/** Whether the fill is too light to be seen on white where it is no whole area. */
function isFaint(name: AreaClass): boolean {
  return name === "no evidence" || name === "no value";
}

/** Lines: solid and wide among their like, light and broken among the others. */
function lineStyle({ name, fragile }: Omit<MapGroup, "rows">): Markup {
  const { ink, fill, hatch } = CLASS_LOOKS[name];
  const color = isFlagged(name) ? fill : ink;
  const dashes = { none: null, rising: "14 6", falling: "14 6", dots: "2 6", cross: "6 6" }[hatch];
  const dash = fragile ? "7 6" : dashes;
  return markup`fill="none" stroke="${color}" stroke-width="${isFlagged(name) ? 6 : 3}"${
    dash && markup` stroke-dasharray="${dash}"`
  }${fragile && markup` stroke-opacity="${FRAGILE_STRENGTH}"`}`;
}

function dashed(ink: string, width: number): Markup {
  return markup`stroke="${ink}" stroke-width="${short(width)}" stroke-dasharray="${
    short(4 * width)
  } ${short(3 * width)}"`;
}

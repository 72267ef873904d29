/**
 * The links map: who is whose neighbor, drawn.
 *
 * @module
 */
import { GEOMETRY_KINDS } from "../layer/geometry.ts";
import { counted } from "../sweep/phrases.ts";
import { fitMap, type MapFrame, UNITS } from "./map_frame.ts";
import { addShape } from "./map_shapes.ts";
import { type Markup, markup } from "./markup.ts";
import { wholeText } from "./number_text.ts";
import { relativePath } from "./relative_path.ts";
import type { DrawnLinks, ReportInput } from "./report_input.ts";
import { scaleBar } from "./scale_bar.ts";
import { INK, svgFigure, svgText } from "./svg.ts";

/** Room of the map, in figure units. */
const ROOM = { width: 1064, height: 700 };
/** Around the map, so that lines at its border are whole. */
const MARGIN = 8;
/** Of more pairs only an even sample is drawn, so that the page stays small and lines can be told apart. */
const MOST_PAIRS = 20_000;
/** Outlines of more areas would be a gray mass. */
const MOST_OUTLINES = 20_000;
/** Half the side of the mark of an area that is alone, in map units. */
const ALONE_MARK = 5;

/** Ends of pairs, one after the other: from0, to0, from1, to1, … */
type Pairs = Uint32Array;

/**
 * Draws each pair as one thin line between the points of its areas, over faint outlines; areas without a neighbor get a
 * square. Coordinates are whole map units: 20,000 lines in about 250 kB. Cost: a pass over the links and outlines.
 *
 * @returns Null where there are no links or nothing has a shape.
 */
export function linksMap(input: ReportInput): Markup | null {
  const { links } = input;
  const frame = links && fitMap(input, () => ROOM);
  if (!links || !frame) return null;
  const pairs = pairsOf(links);
  if (pairs.length === 0) return null;
  const drawn = evenSample(pairs);
  const barTop = Math.round(frame.height) + 2 * MARGIN + 14;
  const label = `Map of ${counted(pairs.length / 2, "pair")} of neighbors`;
  return svgFigure(
    { label, width: ROOM.width + 2 * MARGIN, height: barTop + 18 },
    markup`<g transform="translate(${MARGIN} ${MARGIN}) scale(${
      1 / UNITS
    })" fill="none" stroke-linecap="round">
<path d="${outlines(frame)}" stroke="${INK.grid}" stroke-width="2"/>
<path d="${lines(frame, links, drawn)}" stroke="${INK.text}" stroke-width="1.5" opacity="0.75"/>
<path d="${marks(frame, input)}" fill="${INK.mark}"/>
</g>
`,
    scaleBar(frame.metersPerUnit, { left: MARGIN, top: barTop, mapWidth: frame.width }),
    drawn.length < pairs.length
      ? svgText(ROOM.width, barTop + 12, sampleText(drawn, pairs), {
        anchor: "end",
        fill: INK.muted,
      })
      : null,
  );
}

/** Unordered pairs, each once: links come by area, so the way back of a one-way link is looked up. */
function pairsOf({ from, to }: DrawnLinks): Pairs {
  const ways = new Set<number>();
  const size = from.reduce((most, row, link) => Math.max(most, row, to[link]), 0) + 1;
  for (let link = 0; link < from.length; link++) {
    if (from[link] < to[link]) ways.add(from[link] * size + to[link]);
  }
  const pairs: number[] = [];
  for (let link = 0; link < from.length; link++) {
    const isBack = from[link] > to[link] && ways.has(to[link] * size + from[link]);
    if (!isBack) pairs.push(from[link], to[link]);
  }
  return Uint32Array.from(pairs);
}

function evenSample(pairs: Pairs): Pairs {
  const count = pairs.length / 2;
  if (count <= MOST_PAIRS) return pairs;
  const drawn = new Uint32Array(2 * MOST_PAIRS);
  for (let at = 0; at < MOST_PAIRS; at++) {
    const pair = Math.floor(at * count / MOST_PAIRS);
    drawn.set(pairs.subarray(2 * pair, 2 * pair + 2), 2 * at);
  }
  return drawn;
}

function sampleText(drawn: Pairs, pairs: Pairs): string {
  return `${wholeText(drawn.length / 2)} of ${wholeText(pairs.length / 2)} pairs are drawn`;
}

function outlines(frame: MapFrame): string {
  const path = relativePath();
  const { kinds } = frame.geometry;
  if (kinds.length > MOST_OUTLINES) return "";
  const point = GEOMETRY_KINDS.indexOf("point");
  kinds.forEach((kind, row) => {
    if (kind !== point) addShape(path, frame, row, { name: "no evidence", radius: 0 });
  });
  return path.text();
}

function lines(frame: MapFrame, { places }: DrawnLinks, pairs: Pairs): string {
  const path = relativePath();
  for (let at = 0; at < pairs.length; at += 2) {
    const ends = [...mapPlace(frame, places, pairs[at]), ...mapPlace(frame, places, pairs[at + 1])];
    if (ends.every(Number.isFinite)) path.line(ends);
  }
  return path.text();
}

/** Squares on the areas that were tested but have no neighbor. */
function marks(frame: MapFrame, { links, areas }: ReportInput): string {
  const path = relativePath();
  areas.class.forEach((name, row) => {
    if (name !== "alone" || !links) return;
    const [x, y] = mapPlace(frame, links.places, row);
    if (!Number.isFinite(x + y)) return;
    const [west, north, east, south] = [
      x - ALONE_MARK,
      y - ALONE_MARK,
      x + ALONE_MARK,
      y + ALONE_MARK,
    ];
    path.ring([west, north, east, north, east, south, west, south]);
  });
  return path.text();
}

/** The point of an area in map units, on the same side of the 180th meridian as its shape. */
function mapPlace(
  { geometry, across, down, turn }: MapFrame,
  places: Float64Array,
  row: number,
): [number, number] {
  const { partStarts, ringStarts, vertexStarts, xy } = geometry;
  const first = xy[2 * vertexStarts[ringStarts[partStarts[row]]]];
  const x = places[2 * row];
  const turned = turn > 0 ? x + turn * Math.round((first - x) / turn) : x;
  return [across(turned), down(places[2 * row + 1])];
}

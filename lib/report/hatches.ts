/**
 * Fills of the classes as SVG: plain colors, or patterns that carry the meaning without color.
 *
 * @module
 */
import { AREA_CLASSES, type AreaClass } from "../write/results.ts";
import { CLASS_LOOKS, type ClassLook } from "../write/class_looks.ts";
import { type Markup, markup, trusted } from "./markup.ts";
import { short } from "./svg.ts";

/**
 * Definitions of all patterns.
 *
 * @param figure The figure's name, with which the ids begin.
 * @param size Side of the repeated tile.
 */
export function hatchPatterns(figure: string, size: number): Markup {
  const patterns = AREA_CLASSES.map((name) => {
    const look = CLASS_LOOKS[name];
    if (look.hatch === "none") return null;
    const side = short(size);
    return markup`<pattern id="${
      hatchId(figure, name)
    }" width="${side}" height="${side}" patternUnits="userSpaceOnUse"><rect width="${side}" height="${side}" fill="${look.fill}"/>${
      trusted(tileMarks(look, size))
    }</pattern>`;
  });
  return markup`<defs>${patterns}</defs>`;
}

/** Value for `fill`: a color, or a reference to a pattern of {@link hatchPatterns}. */
export function classFill(figure: string, name: AreaClass): string {
  const { hatch, fill } = CLASS_LOOKS[name];
  return hatch === "none" ? fill : `url(#${hatchId(figure, name)})`;
}

function hatchId(figure: string, name: AreaClass): string {
  return `${figure}-${name.replaceAll(" ", "-")}`;
}

/** The marks of one tile; diagonals run on into the corners so that tiles join without gaps. */
function tileMarks({ hatch, ink }: ClassLook, size: number): string {
  const [s, h] = [short(size), short(size / 2)];
  if (hatch === "dots") {
    return `<circle cx="${h}" cy="${h}" r="${short(size / 7)}" fill="${ink}"/>`;
  }
  const rising = `M${-h} ${h}L${h} ${-h}M0 ${s}L${s} 0M${h} ${s + h}L${s + h} ${h}`;
  const falling = `M${-h} ${h}L${h} ${s + h}M0 0L${s} ${s}M${h} ${-h}L${s + h} ${h}`;
  const lines = { rising, falling, cross: rising + falling, none: "" }[hatch];
  return `<path d="${lines}" stroke="${ink}" stroke-width="${short(size / 6)}" fill="none"/>`;
}

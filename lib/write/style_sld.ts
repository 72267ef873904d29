/**
 * The classes as a style that map viewers load: OGC Styled Layer Descriptor 1.1 with Symbology Encoding 1.1.
 *
 * @module
 */
import { CLASS_LOOKS, FRAGILE_STRENGTH, type Hatch, isFlagged, isFragile } from "./class_looks.ts";
import { AREA_CLASSES, type AreaClass, type AreaResults } from "./results.ts";

/** Options of {@link styleSld}. */
export interface StyleOptions {
  /** What most areas are. @default "polygon" */
  readonly shape?: string;
  /** Field that holds the class. @default PREFIX_class */
  readonly classField?: string;
  /** Field that holds the steadiness. @default PREFIX_steady */
  readonly steadyField?: string;
}

/** A mark, how far it is turned in degrees, and its size in pixels. */
interface Mark {
  readonly mark: string;
  readonly turn?: number;
  readonly size: number;
}

/** Hatches by marks that desktop viewers draw; others show the plain fill below. */
const HATCH_MARKS: Readonly<Record<Exclude<Hatch, "none">, Mark>> = {
  rising: { mark: "horline", turn: 45, size: 7 },
  falling: { mark: "horline", turn: -45, size: 7 },
  cross: { mark: "x", size: 8 },
  dots: { mark: "circle", size: 3 },
};

/** Forms of points: up for high, down for low, as in the report. */
const POINT_MARKS: Readonly<Record<AreaClass, Mark>> = {
  "high among high": { mark: "triangle", size: 9 },
  "low among low": { mark: "triangle", turn: 180, size: 9 },
  "high among low": { mark: "triangle", size: 9 },
  "low among high": { mark: "triangle", turn: 180, size: 9 },
  "no evidence": { mark: "circle", size: 6 },
  "alone": { mark: "circle", size: 9 },
  "no value": { mark: "x", size: 9 },
};

/**
 * One rule for each class that occurs, with the colors and hatches of the report; fragile areas have a rule of
 * their own, at half strength with a dashed outline. Hatches are drawn over a plain fill, so that a
 * viewer that does not know a hatch still shows the color.
 *
 * @returns The document as text, without anything that changes from run to run.
 */
export function styleSld(areas: AreaResults, options: StyleOptions = {}): string {
  const {
    shape = "polygon",
    classField = `${areas.prefix}_class`,
    steadyField = `${areas.prefix}_steady`,
  } = options;
  const rules = occurringClasses(areas).map(({ name, fragile }) => {
    const isClass = equals(classField, name), hasFragile = equals(steadyField, "fragile");
    const whole = { shape, filter: isClass };
    if (!fragile) return ruleOf(name, whole);
    const rest = `<ogc:And>${isClass}<ogc:Not>${hasFragile}</ogc:Not></ogc:And>`;
    return ruleOf(name, { ...whole, filter: rest }) +
      ruleOf(name, { ...whole, filter: `<ogc:And>${isClass}${hasFragile}</ogc:And>`, fragile });
  });
  return `<?xml version="1.0" encoding="UTF-8"?>
<StyledLayerDescriptor version="1.1.0" xmlns="http://www.opengis.net/sld" xmlns:se="http://www.opengis.net/se" xmlns:ogc="http://www.opengis.net/ogc" xmlns:xsi="http://www.w3.org/2001/XMLSchema-instance" xsi:schemaLocation="http://www.opengis.net/sld http://schemas.opengis.net/sld/1.1.0/StyledLayerDescriptor.xsd">
<NamedLayer>
<se:Name>areas</se:Name>
<UserStyle>
<se:Name>${escaped(classField)}</se:Name>
<se:FeatureTypeStyle>
${rules.join("")}</se:FeatureTypeStyle>
</UserStyle>
</NamedLayer>
</StyledLayerDescriptor>
`;
}

/** Classes that occur, and whether some of their areas are fragile. */
function occurringClasses(areas: AreaResults): { name: AreaClass; fragile: boolean }[] {
  const all = new Set<AreaClass>(areas.class);
  const fragile = new Set(areas.class.filter((_, row) => isFragile(areas.steady?.[row])));
  return AREA_CLASSES.filter((name) => all.has(name))
    .map((name) => ({ name, fragile: fragile.has(name) }));
}

interface RuleOptions {
  readonly shape: string;
  readonly filter: string;
  readonly fragile?: boolean;
}

function ruleOf(name: AreaClass, { shape, filter, fragile = false }: RuleOptions): string {
  const title = fragile ? `${name}, fragile` : name;
  const symbols = shape === "point" ? pointSymbol : shape === "line" ? lineSymbol : polygonSymbols;
  return `<se:Rule>
<se:Name>${title}</se:Name>
<se:Description><se:Title>${title}</se:Title></se:Description>
<ogc:Filter>${filter}</ogc:Filter>
${symbols(name, fragile)}
</se:Rule>
`;
}

function equals(field: string, value: string): string {
  return `<ogc:PropertyIsEqualTo><ogc:PropertyName>${
    escaped(field)
  }</ogc:PropertyName><ogc:Literal>${value}</ogc:Literal></ogc:PropertyIsEqualTo>`;
}

/** A plain fill, and over it the hatch, with the outline on whichever is on top. */
function polygonSymbols(name: AreaClass, fragile: boolean): string {
  const { fill, ink, hatch } = CLASS_LOOKS[name];
  const opacity = fragile ? FRAGILE_STRENGTH : 1;
  const isBlank = fill === "#FFFFFF";
  const outline = fragile
    ? stroke(ink, { width: 1, dash: "4 3" })
    : isBlank
    ? stroke(ink, { width: 0.6, dash: hatch === "dots" ? "1 2" : undefined })
    : stroke("#FFFFFF", { width: 0.4 });
  const plain = solid(fill, opacity);
  if (hatch === "none") return `<se:PolygonSymbolizer>${plain}${outline}</se:PolygonSymbolizer>`;
  const lines = solid(ink, opacity) + stroke(ink, { width: 0.5, opacity });
  const marks = graphic(HATCH_MARKS[hatch], lines);
  return `<se:PolygonSymbolizer>${plain}</se:PolygonSymbolizer>
<se:PolygonSymbolizer><se:Fill><se:GraphicFill>${marks}</se:GraphicFill></se:Fill>${outline}</se:PolygonSymbolizer>`;
}

function pointSymbol(name: AreaClass, fragile: boolean): string {
  const { fill, ink } = CLASS_LOOKS[name];
  const inside = solid(name === "no value" ? ink : fill, fragile ? FRAGILE_STRENGTH : 1);
  const outline = stroke(ink, fragile ? { width: 0.8, dash: "2 1.5" } : { width: 0.8 });
  return `<se:PointSymbolizer>${graphic(POINT_MARKS[name], inside + outline)}</se:PointSymbolizer>`;
}

function lineSymbol(name: AreaClass, fragile: boolean): string {
  const { fill, ink, hatch } = CLASS_LOOKS[name];
  const dashes = { none: undefined, rising: "7 3", falling: "7 3", dots: "1 3", cross: "3 3" };
  return `<se:LineSymbolizer>${
    stroke(fill === "#FFFFFF" ? ink : fill, {
      width: isFlagged(name) ? 3 : 1.5,
      dash: fragile ? "4 3" : dashes[hatch],
      opacity: fragile ? FRAGILE_STRENGTH : 1,
    })
  }</se:LineSymbolizer>`;
}

function graphic({ mark, turn, size }: Mark, inside: string): string {
  const rotation = turn === undefined ? "" : `<se:Rotation>${turn}</se:Rotation>`;
  return `<se:Graphic><se:Mark><se:WellKnownName>${mark}</se:WellKnownName>${inside}</se:Mark><se:Size>${size}</se:Size>${rotation}</se:Graphic>`;
}

function solid(color: string, opacity: number): string {
  return `<se:Fill>${parameter("fill", color)}${
    opacity < 1 ? parameter("fill-opacity", opacity) : ""
  }</se:Fill>`;
}

function stroke(
  color: string,
  { width, dash, opacity = 1 }: {
    readonly width: number;
    readonly dash?: string;
    readonly opacity?: number;
  },
): string {
  return `<se:Stroke>${parameter("stroke", color)}${
    opacity < 1 ? parameter("stroke-opacity", opacity) : ""
  }${parameter("stroke-width", width)}${
    dash ? parameter("stroke-dasharray", dash) : ""
  }</se:Stroke>`;
}

function parameter(name: string, value: string | number): string {
  return `<se:SvgParameter name="${name}">${value}</se:SvgParameter>`;
}

function escaped(text: string): string {
  return text.replaceAll("&", "&amp;").replaceAll("<", "&lt;").replaceAll(">", "&gt;");
}

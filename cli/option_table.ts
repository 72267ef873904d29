/**
 * The one table of commands and options: parser, help and the reference in the README come from it.
 *
 * @module
 */

/** One option of a command. */
export interface OptionRow {
  /** Long flag without dashes, such as `value-where`. */
  readonly flag: string;
  /** Name of the argument in help; none for a switch. */
  readonly argument?: string;
  readonly text: string;
  /** The default as help prints it; the library owns the value. */
  readonly default?: string;
  readonly required?: boolean;
  /** May be given more than once. */
  readonly repeat?: boolean;
}

/** One command. */
export interface CommandRow {
  readonly name: string;
  /** Positional argument, where the command takes one. */
  readonly argument?: { readonly name: string; readonly text: string };
  readonly text: string;
  readonly options: readonly OptionRow[];
}

const tableOptions: readonly OptionRow[] = [
  {
    flag: "delimiter",
    argument: "CHAR",
    text: "Column delimiter of CSV tables; `tab` for a tab",
    default: "detected",
  },
  {
    flag: "encoding",
    argument: "NAME",
    text: "Text encoding of CSV tables, such as windows-1252",
    default: "detected",
  },
  { flag: "sheet", argument: "NAME", text: "Sheet of a workbook", default: "the only one" },
];

const layerOptions: readonly OptionRow[] = [
  { flag: "layer", argument: "NAME", text: "Layer of a file that holds several" },
  {
    flag: "id",
    argument: "FIELD",
    text: "Field that names the areas in tables, links and messages",
    default: "row number",
  },
  {
    flag: "x",
    argument: "FIELD",
    text: "x (or longitude) column of a CSV layer",
    default: "detected",
  },
  {
    flag: "y",
    argument: "FIELD",
    text: "y (or latitude) column of a CSV layer",
    default: "detected",
  },
  {
    flag: "wkt",
    argument: "FIELD",
    text: "WKT geometry column of a CSV layer",
    default: "detected",
  },
  {
    flag: "crs",
    argument: "CRS",
    text: "CRS of a layer that declares none, such as EPSG:25832",
  },
  ...tableOptions,
];

const neighborOptions: readonly OptionRow[] = [
  {
    flag: "neighbors",
    argument: "RULE",
    text: "Who is a neighbor: touching, edge, nearest:K, within:DIST, links:FILE.csv, " +
      "triangulated, gabriel, relative, sphere, same:FIELD; combined with +, & and -",
    default: "touching for polygons, nearest:6 for points",
  },
  {
    flag: "metric",
    argument: "HOW",
    text: 'How distance is measured: auto, planar, geodesic, EPSG:N or a "proj string"',
    default: "auto",
  },
  {
    flag: "points",
    argument: "X,Y",
    text: "Two fields that hold a point for each area, in the layer's coordinates",
    default: "points inside the areas",
  },
  {
    flag: "weights",
    argument: "KIND",
    text:
      "How much each neighbor counts: equal, inverse:P, exponential:D, gaussian:D, bisquare:D, " +
      "triangular:D, epanechnikov:D (D a length or kN, each area's distance to its N-th nearest), " +
      "boundary (shared length) or given (with the links of a file)",
    default: "equal",
  },
  {
    flag: "standardize",
    argument: "HOW",
    text: "How rows are scaled: row, none, total or variance",
    default: "row",
  },
];

/** Every command of nearkin, in the order help lists them. */
export const COMMANDS: readonly CommandRow[] = [
  {
    name: "assess",
    argument: { name: "LAYER", text: "Any vector layer, or a CSV with x/y or WKT" },
    text: "Is the map clustered, where, and would it still stand? (the main job)",
    options: [
      {
        flag: "value",
        argument: "FIELD",
        text: "The number to test, one per area (a field of the layer or of the joined table)",
        default: "required, unless --rate is given",
      },
      {
        flag: "rate",
        argument: "CASES/POPULATION",
        text: "Test a rate instead: two fields, tested as standardized rates",
      },
      {
        flag: "per",
        argument: "N",
        text: "Show rates per so many of the population",
        default: "1000",
      },
      {
        flag: "share",
        text: "Nobody counts twice in the rate: cases are part of the population",
      },
      {
        flag: "name",
        argument: "NAME",
        text: "Name of a rate and of its result fields",
        default: "CASES_rate",
      },
      {
        flag: "transform",
        argument: "HOW",
        text:
          "Transform before testing: none, log, log1p, sqrt, rank or normal-scores; with --rate freeman-tukey",
        default: "none; standardized rates with --rate",
      },
      {
        flag: "out",
        argument: "DIR",
        text: "Folder for the outcome",
        required: true,
      },
      ...layerOptions,
      {
        flag: "where",
        argument: "FILTER",
        text: "Keep only these areas, such as \"region = 'north'\"",
      },
      {
        flag: "value-where",
        argument: "FILTER",
        text: "Test only these areas; the others still count as neighbors",
      },
      { flag: "join", argument: "TABLE", text: "CSV or XLSX table to join" },
      {
        flag: "on",
        argument: "KEY",
        text: "Key of the join; LAYERKEY=TABLEKEY where the names differ",
      },
      { flag: "join-where", argument: "FILTER", text: "Rows of the table to join" },
      {
        flag: "missing-values",
        argument: "LIST",
        text: "Texts that stand for no value, such as '*,..,<5,-999'",
      },
      {
        flag: "decimal",
        argument: "MARK",
        text: "Decimal mark of text numbers: . or ,",
        default: "detected",
      },
      {
        flag: "thousands",
        argument: "MARK",
        text: "Thousands mark of text numbers: none , . ' or a space",
        default: "detected",
      },
      ...neighborOptions,
      {
        flag: "permutations",
        argument: "N",
        text: "Permutations of the global test",
        default: "999",
      },
      {
        flag: "local-permutations",
        argument: "N",
        text: "Conditional permutations of each area",
        default: "999999 (99999 for each definition of the sweep)",
      },
      {
        flag: "seed",
        argument: "TEXT",
        text: "Any text; the same text gives the same result",
        default: "nearkin",
      },
      { flag: "level", argument: "P", text: "Level of significance", default: "0.05" },
      {
        flag: "adjust",
        argument: "METHOD",
        text: "Adjustment of the areas' p for many tests: none, bonferroni, holm, bh or by",
        default: "bh",
      },
      {
        flag: "vary",
        argument: "RULES",
        text: "Other definitions to try, such as 'nearest:4..12' or 'within:2km..20km/10'",
        default: "the standard sweep",
        repeat: true,
      },
      { flag: "no-sweep", text: "Try the main definition only" },
      {
        flag: "also",
        argument: "FORMATS",
        text: "Write the areas in these formats too, such as gpkg,shp",
      },
      { flag: "force", text: "Replace an earlier outcome" },
      { flag: "json", text: "Print results.json instead of the summary" },
      { flag: "quiet", text: "Print nothing but errors" },
    ],
  },
  {
    name: "inspect",
    argument: { name: "LAYER", text: "Any vector layer, or a CSV with x/y or WKT" },
    text: "What is in this file, and which assess command would fit?",
    options: [
      ...layerOptions,
      { flag: "json", text: "Print the findings as JSON" },
    ],
  },
  {
    name: "neighbors",
    argument: { name: "LAYER", text: "Any vector layer, or a CSV with x/y or WKT" },
    text: "Build the links, describe them and write them",
    options: [
      ...layerOptions,
      ...neighborOptions,
      {
        flag: "out",
        argument: "FILE",
        text:
          "Write the links, format by the ending: .csv as from,to,weight,distance, else lines " +
          "(.fgb, .gpkg, .geojson, …); links:FILE reads them back",
      },
      { flag: "force", text: "Replace the file" },
      { flag: "json", text: "Print the description as JSON" },
      { flag: "quiet", text: "Print nothing but errors" },
    ],
  },
  {
    name: "demo",
    text: "Make an invented region, run the main job on it and say where to look",
    options: [
      { flag: "out", argument: "DIR", text: "Folder to write to", default: "nearkin-demo" },
      { flag: "force", text: "Replace an earlier demo" },
      { flag: "quiet", text: "Print nothing but errors" },
    ],
  },
  {
    name: "formats",
    text: "List the formats that can be read and written",
    options: [{ flag: "json", text: "Print the list as JSON" }],
  },
];

/** An option as help and the README show it. */
export function optionUsage(option: OptionRow): string {
  return `--${option.flag}${option.argument ? ` ${option.argument}` : ""}`;
}

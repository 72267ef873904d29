/**
 * What a caller may ask of the main job.
 *
 * @module
 */
import type { Adjustment } from "../inference/adjust.ts";
import type { Standardize } from "../weights/standardize.ts";
import type { Transform } from "../prepare/transform.ts";

/** Where a layer comes from and how to read it. */
export interface SourceOptions {
  /** Layer of a file that holds several. */
  readonly layer?: string;
  /** Field that names the areas. @default row numbers */
  readonly id?: string;
  /** x (or longitude) column of a CSV layer. @default detected by name */
  readonly x?: string;
  /** y (or latitude) column of a CSV layer. @default detected by name */
  readonly y?: string;
  /** WKT column of a CSV layer. @default detected by name */
  readonly wkt?: string;
  /** CRS of a layer that declares none, such as `EPSG:25832`. */
  readonly crs?: string;
  /** Delimiter of CSV tables. @default detected */
  readonly delimiter?: string;
  /** Text encoding of CSV tables. @default detected */
  readonly encoding?: string;
  /** Sheet of a workbook. @default the only one */
  readonly sheet?: string;
}

/** Who counts as a neighbor and how far apart areas are. */
export interface NeighborOptions {
  /** Neighbor rule. @default `touching` for polygons, `nearest:6` for points */
  readonly neighbors?: string;
  /** `auto`, `planar`, `geodesic`, `EPSG:N` or a proj string. @default "auto" */
  readonly metric?: string;
  /** Two fields that hold a point for each area, as `X,Y`, in the layer's own coordinates. @default points inside the areas */
  readonly points?: string;
  /** How much each neighbor counts. @default "equal" */
  readonly weights?: string;
  /** How rows are scaled. @default "row" */
  readonly standardize?: Standardize;
}

/** Long work reports here and can be stopped. */
export interface WorkOptions {
  readonly signal?: AbortSignal;
  /** Called with the stage in plain words and the share done, 0 to 1, where it is known. */
  readonly onProgress?: (stage: string, share?: number) => void;
}

/** What to test; exactly one of `value` and `rate`. */
export interface IndicatorOptions {
  /** The number to test: a field of the layer or of the joined table. */
  readonly value?: string;
  /** The rate to test, `CASES/POPULATION`: two fields. */
  readonly rate?: string;
  /** Rates are shown per so many of the population. @default 1000 */
  readonly per?: number;
  /** Whether nobody counts twice in a rate: cases are part of the population, as damp homes of all homes. @default false */
  readonly share?: boolean;
  /** Name of a rate and of its result fields. @default the cases field with `_rate` behind it */
  readonly name?: string;
  /** Transform of the values; of a rate `freeman-tukey`. @default "none", and standardized rates for a rate */
  readonly transform?: Transform | "freeman-tukey";
}

/** Options of {@link assess}. */
export interface AssessOptions
  extends SourceOptions, IndicatorOptions, NeighborOptions, WorkOptions {
  /** Keep only these areas. */
  readonly where?: string;
  /** Test only these areas; the others still count as neighbors. */
  readonly valueWhere?: string;
  /** Table to join, CSV or XLSX. */
  readonly join?: string;
  /** Key of the join, `LAYERKEY=TABLEKEY` where the names differ. */
  readonly on?: string;
  /** Rows of the table to join. */
  readonly joinWhere?: string;
  /** Texts that stand for no value, as a list: `*,..,<5,-999`. @default "" */
  readonly missingValues?: string;
  /** Decimal mark of text numbers. @default detected */
  readonly decimal?: "." | ",";
  /** Thousands mark of text numbers. @default detected */
  readonly thousands?: "none" | "," | "." | "'" | " ";
  /** Permutations of the global test. @default 999 */
  readonly permutations?: number;
  /** Conditional permutations of each area. @default 999999, and 99999 for each definition of the sweep */
  readonly localPermutations?: number;
  /** Any text. @default "nearkin" */
  readonly seed?: string;
  /** Level of significance. @default 0.05 */
  readonly level?: number;
  /** Adjustment of the areas' p for many tests. @default "bh" */
  readonly adjust?: Adjustment;
  /** Other definitions to try, each text a list of rules or spans. @default the standard sweep */
  readonly vary?: readonly string[];
  /** Whether to try other definitions at all. @default true */
  readonly sweep?: boolean;
}

/**
 * The head of a FlatGeobuf file: what it says about its layer before the first feature.
 *
 * A file is 8 magic bytes, a size-prefixed header, an optional spatial index, and size-prefixed
 * features (https://flatgeobuf.org). Both directions are here, so that a header can be rebuilt with a
 * few things changed and everything else kept.
 *
 * @module
 */
import { Builder, ByteBuffer } from "flatbuffers";
import { Column } from "flatgeobuf/lib/mjs/flat-geobuf/column.js";
import { Crs } from "flatgeobuf/lib/mjs/flat-geobuf/crs.js";
import { Header } from "flatgeobuf/lib/mjs/flat-geobuf/header.js";
import { calcTreeSize } from "flatgeobuf/lib/mjs/packedrtree.js";
import { viewOf } from "./flat_table.ts";
import type { Crs as LayerCrs } from "./layer.ts";

/** Column types of the format, by number. */
export const FGB_TYPES = {
  byte: 0,
  ubyte: 1,
  bool: 2,
  short: 3,
  ushort: 4,
  int: 5,
  uint: 6,
  long: 7,
  ulong: 8,
  float: 9,
  double: 10,
  string: 11,
  json: 12,
  datetime: 13,
  binary: 14,
} as const;

/** A column as the header declares it. */
export interface FgbColumn {
  readonly name: string;
  /** See {@link FGB_TYPES}. */
  readonly type: number;
  readonly title: string | null;
  readonly description: string | null;
  readonly width: number;
  readonly precision: number;
  readonly scale: number;
  readonly nullable: boolean;
  readonly unique: boolean;
  readonly primaryKey: boolean;
  readonly metadata: string | null;
}

/** A coordinate reference system as the header declares it. */
export interface FgbCrs {
  readonly org: string | null;
  readonly code: number;
  readonly name: string | null;
  readonly description: string | null;
  readonly wkt: string | null;
  readonly codeString: string | null;
}

/** Everything the header holds. */
export interface FgbHeader {
  readonly name: string;
  /** [west, south, east, north], or null. */
  readonly envelope: readonly number[] | null;
  /** Type of all features, or 0 where each feature names its own. */
  readonly geometryType: number;
  readonly hasZ: boolean;
  readonly hasM: boolean;
  readonly hasT: boolean;
  readonly hasTm: boolean;
  readonly columns: readonly FgbColumn[];
  /** 0 where unknown. */
  readonly featuresCount: number;
  /** 0 where the file has no spatial index. */
  readonly indexNodeSize: number;
  readonly crs: FgbCrs | null;
  readonly title: string | null;
  readonly description: string | null;
  readonly metadata: string | null;
}

/** A nullable column of which nothing but name and type is known. */
export function newFgbColumn(name: string, type: number): FgbColumn {
  return {
    name,
    type,
    title: null,
    description: null,
    width: -1,
    precision: -1,
    scale: -1,
    nullable: true,
    unique: false,
    primaryKey: false,
    metadata: null,
  };
}

/** `fgb`, major version 3, `fgb`, patch version. */
const MAGIC = [0x66, 0x67, 0x62, 0x03, 0x66, 0x67, 0x62, 0x01] as const;

/** Whether bytes start like a FlatGeobuf file of the version read here. */
export function looksLikeFgb(bytes: Uint8Array): boolean {
  return bytes.length > 12 && MAGIC.slice(0, 7).every((byte, i) => bytes[i] === byte);
}

/** A reference system as the format stores it. */
export function fgbCrs({ name, code, wkt }: LayerCrs): FgbCrs {
  const [org, number] = code?.split(":") ?? [];
  const numeric = /^[0-9]+$/.test(number ?? "");
  return {
    org: org ?? null,
    code: numeric ? Number(number) : 0,
    name,
    description: null,
    wkt,
    codeString: numeric ? null : number ?? null,
  };
}

/** Reads the header. @returns also where features begin, past any spatial index. */
export function readFgbHeader(
  bytes: Uint8Array,
): { readonly header: FgbHeader; readonly featuresAt: number } {
  const buffer = new ByteBuffer(bytes);
  buffer.setPosition(MAGIC.length);
  const stored = Header.getSizePrefixedRootAsHeader(buffer);
  const header: FgbHeader = {
    name: stored.name() ?? "",
    envelope: stored.envelopeLength() >= 4
      ? Array.from({ length: stored.envelopeLength() }, (_, i) => stored.envelope(i) ?? 0)
      : null,
    geometryType: stored.geometryType(),
    hasZ: stored.hasZ(),
    hasM: stored.hasM(),
    hasT: stored.hasT(),
    hasTm: stored.hasTm(),
    columns: Array.from({ length: stored.columnsLength() }, (_, i) => readHeaderColumn(stored, i)),
    featuresCount: Number(stored.featuresCount()),
    indexNodeSize: stored.indexNodeSize(),
    crs: readHeaderCrs(stored),
    title: stored.title(),
    description: stored.description(),
    metadata: stored.metadata(),
  };
  const afterHeader = MAGIC.length + 4 + viewOf(bytes).getUint32(MAGIC.length, true);
  const indexed = header.indexNodeSize > 0 && header.featuresCount > 0;
  const index = indexed ? calcTreeSize(header.featuresCount, header.indexNodeSize) : 0;
  return { header, featuresAt: afterHeader + index };
}

function readHeaderColumn(header: Header, i: number): FgbColumn {
  const column = header.columns(i) as Column;
  return {
    name: column.name() ?? "",
    type: column.type(),
    title: column.title(),
    description: column.description(),
    width: column.width(),
    precision: column.precision(),
    scale: column.scale(),
    nullable: column.nullable(),
    unique: column.unique(),
    primaryKey: column.primaryKey(),
    metadata: column.metadata(),
  };
}

function readHeaderCrs(header: Header): FgbCrs | null {
  const crs = header.crs();
  return crs && {
    org: crs.org(),
    code: crs.code(),
    name: crs.name(),
    description: crs.description(),
    wkt: crs.wkt(),
    codeString: crs.codeString(),
  };
}

/** Magic bytes and header, as they open a file. */
export function encodeFgbHeader(header: FgbHeader): Uint8Array {
  const builder = new Builder(1024);
  const text = (value: string | null) => value === null ? 0 : builder.createString(value);
  const columns = header.columns.map((column) => encodeColumn(builder, column, text));
  const columnsVector = columns.length > 0 ? Header.createColumnsVector(builder, columns) : 0;
  const crs = header.crs === null ? 0 : encodeCrs(builder, header.crs, text);
  const envelope = header.envelope === null
    ? 0
    : Header.createEnvelopeVector(builder, [...header.envelope]);
  const [name, title, description, metadata] = [
    text(header.name),
    text(header.title),
    text(header.description),
    text(header.metadata),
  ];
  Header.startHeader(builder);
  Header.addName(builder, name);
  Header.addEnvelope(builder, envelope);
  Header.addGeometryType(builder, header.geometryType);
  Header.addHasZ(builder, header.hasZ);
  Header.addHasM(builder, header.hasM);
  Header.addHasT(builder, header.hasT);
  Header.addHasTm(builder, header.hasTm);
  Header.addColumns(builder, columnsVector);
  Header.addFeaturesCount(builder, BigInt(header.featuresCount));
  Header.addIndexNodeSize(builder, header.indexNodeSize);
  Header.addCrs(builder, crs);
  Header.addTitle(builder, title);
  Header.addDescription(builder, description);
  Header.addMetadata(builder, metadata);
  Header.finishSizePrefixedHeaderBuffer(builder, Header.endHeader(builder));
  const encoded = builder.asUint8Array();
  const file = new Uint8Array(MAGIC.length + encoded.length);
  file.set(MAGIC);
  file.set(encoded, MAGIC.length);
  return file;
}

type EncodeText = (value: string | null) => number;

function encodeColumn(builder: Builder, column: FgbColumn, text: EncodeText): number {
  return Column.createColumn(
    builder,
    text(column.name),
    column.type,
    text(column.title),
    text(column.description),
    column.width,
    column.precision,
    column.scale,
    column.nullable,
    column.unique,
    column.primaryKey,
    text(column.metadata),
  );
}

function encodeCrs(builder: Builder, crs: FgbCrs, text: EncodeText): number {
  return Crs.createCrs(
    builder,
    text(crs.org),
    crs.code,
    text(crs.name),
    text(crs.description),
    text(crs.wkt),
    text(crs.codeString),
  );
}

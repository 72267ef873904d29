/**
 * The elements of a KML file that matter here: placemarks, their folders, declared field types.
 *
 * @module
 */
import { SaxesParser } from "saxes";
import { UnreadableError } from "../layer/errors.ts";

/** An XML element; prefixes of names are dropped. */
export interface KmlElement {
  readonly name: string;
  readonly attributes: Readonly<Record<string, string>>;
  readonly children: KmlElement[];
  /** Text directly inside. */
  text: string;
}

/** A placemark and the folder (or document) that holds it. */
export interface Placemark {
  readonly element: KmlElement;
  readonly folder: KmlElement | undefined;
}

/** What a KML file holds, in its order. */
export interface KmlContent {
  readonly placemarks: readonly Placemark[];
  /** KML type of each field that a schema declares. */
  readonly types: ReadonlyMap<string, string>;
}

/**
 * Reads a KML file; only one placemark at a time hangs in the tree, so memory stays in proportion.
 * @throws UnreadableError where it is not well-formed XML, with the line.
 */
export function parseKml(source: string, bytes: Uint8Array): KmlContent {
  const placemarks: Placemark[] = [];
  const types = new Map<string, string>();
  const open: KmlElement[] = [];
  const parser = new SaxesParser();
  parser.on("error", (error) => {
    throw new UnreadableError(`Cannot read ${source} as KML (${error.message.replace(/\.$/, "")})`);
  });
  parser.on("opentag", ({ name, attributes }) => {
    const element: KmlElement = {
      name: name.replace(/^.*:/, ""),
      attributes,
      children: [],
      text: "",
    };
    open.at(-1)?.children.push(element);
    open.push(element);
  });
  const append = (text: string) => {
    const element = open.at(-1);
    if (element !== undefined) element.text += text;
  };
  parser.on("text", append);
  parser.on("cdata", append);
  parser.on("closetag", () => {
    const element = open.pop() as KmlElement;
    if (element.name === "SimpleField") {
      types.set(element.attributes.name ?? "", element.attributes.type ?? "string");
    }
    if (element.name !== "Placemark") return;
    const folder = open.at(-1);
    folder?.children.pop();
    placemarks.push({ element, folder });
  });
  parser.write(decodeXml(source, bytes)).close();
  return { placemarks, types };
}

/** Text in the encoding that the XML declaration names, UTF-8 without one. */
function decodeXml(source: string, bytes: Uint8Array): string {
  if (bytes[0] === 0xff && bytes[1] === 0xfe) return new TextDecoder("utf-16le").decode(bytes);
  if (bytes[0] === 0xfe && bytes[1] === 0xff) return new TextDecoder("utf-16be").decode(bytes);
  const start = new TextDecoder("latin1").decode(bytes.subarray(0, 200));
  const named = /<\?xml[^>]*encoding=["']([\w.:-]+)["']/.exec(start)?.[1] ?? "utf-8";
  try {
    return new TextDecoder(named).decode(bytes);
  } catch (cause) {
    throw new UnreadableError(
      `Cannot read ${source} as its text encoding ${named} is not known; save it as UTF-8`,
      { cause },
    );
  }
}

/** The first child of a name. */
export function child(element: KmlElement, name: string): KmlElement | undefined {
  return element.children.find((candidate) => candidate.name === name);
}

/** All children of a name. */
export function childrenNamed(element: KmlElement | undefined, name: string): KmlElement[] {
  return element?.children.filter((candidate) => candidate.name === name) ?? [];
}

/** Trimmed text of the first child of a name; null where it is missing or empty. */
export function textOf(element: KmlElement, name: string): string | null {
  return child(element, name)?.text.trim() || null;
}

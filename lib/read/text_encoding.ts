/**
 * Which bytes are which letters: byte-order marks, UTF-8 by its own strictness, else Windows-1252.
 *
 * @module
 */
import { UnreadableError, UsageError } from "../layer/errors.ts";

/** Text and the encoding it was read with (a WHATWG label in lower case). */
export interface DecodedText {
  readonly text: string;
  readonly encoding: string;
}

/** Options of {@link decodeText}. */
export interface DecodeOptions {
  /** File name for messages. */
  readonly source: string;
  /** A WHATWG label such as `utf-8`, `windows-1252`, `iso-8859-2` or `utf-16le`. @default detected */
  readonly encoding?: string;
}

/**
 * Decodes a text file. Detection, in this order: a byte-order mark (UTF-8, UTF-16LE, UTF-16BE); UTF-8 when all
 * bytes are valid UTF-8, which text in an old one-byte encoding practically never is; else
 * Windows-1252, the usual encoding of spreadsheets in Western Europe and the Americas. A byte-order
 * mark is dropped. Line ends stay as they are.
 *
 * @throws {UsageError} when the named encoding is unknown.
 * @throws {UnreadableError} when the bytes are not text in the named encoding, or look binary.
 */
export function decodeText(bytes: Uint8Array, options: DecodeOptions): DecodedText {
  const { source, encoding } = options;
  if (encoding !== undefined) return decodeAs(bytes, encoding, source);
  const marked = markedEncoding(bytes);
  if (marked) return decodeAs(bytes, marked, source);
  if (bytes.includes(0)) {
    throw new UnreadableError(
      `Cannot read ${source} as text as it holds zero bytes; ` +
        "if it is UTF-16 text, name it with --encoding utf-16le",
    );
  }
  try {
    return { text: new TextDecoder("utf-8", { fatal: true }).decode(bytes), encoding: "utf-8" };
  } catch {
    return { text: new TextDecoder("windows-1252").decode(bytes), encoding: "windows-1252" };
  }
}

function markedEncoding(bytes: Uint8Array): string | null {
  if (bytes[0] === 0xef && bytes[1] === 0xbb && bytes[2] === 0xbf) return "utf-8";
  if (bytes[0] === 0xff && bytes[1] === 0xfe) return "utf-16le";
  if (bytes[0] === 0xfe && bytes[1] === 0xff) return "utf-16be";
  return null;
}

function decodeAs(bytes: Uint8Array, encoding: string, source: string): DecodedText {
  const decoder = decoderOf(encoding);
  try {
    return { text: decoder.decode(bytes), encoding: decoder.encoding };
  } catch {
    throw new UnreadableError(
      `Cannot read ${source} as ${decoder.encoding} as some of its bytes do not occur in that encoding; ` +
        "leave --encoding out to detect it, or try windows-1252",
    );
  }
}

function decoderOf(encoding: string): TextDecoder {
  try {
    return new TextDecoder(encoding.trim(), { fatal: true });
  } catch {
    throw new UsageError(
      `Cannot use --encoding ${encoding}; give a name such as utf-8, windows-1252, iso-8859-2 or utf-16le`,
    );
  }
}

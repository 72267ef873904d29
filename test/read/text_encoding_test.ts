import assert from "node:assert/strict";
import { UnreadableError, UsageError } from "../../lib/layer/errors.ts";
import { decodeText } from "../../lib/read/text_encoding.ts";
import { fault } from "../support/fault.ts";

const source = "a.csv";

Deno.test("decodeText() reads plain UTF-8 and drops its byte-order mark", () => {
  const bytes = new TextEncoder().encode("\uFEFFÅs;1");
  assert.deepEqual(decodeText(bytes, { source }), { text: "Ås;1", encoding: "utf-8" });
  const unmarked = bytes.subarray(3);
  assert.deepEqual(decodeText(unmarked, { source }), { text: "Ås;1", encoding: "utf-8" });
});

Deno.test("decodeText() takes invalid UTF-8 for Windows-1252, euro sign and quotes included", () => {
  // K ö l n space € space „ “ in Windows-1252; 0x80 and 0x84 are control characters in ISO 8859-1.
  const bytes = Uint8Array.of(0x4b, 0xf6, 0x6c, 0x6e, 0x20, 0x80, 0x20, 0x84, 0x93);
  assert.deepEqual(decodeText(bytes, { source }), { text: "Köln € „“", encoding: "windows-1252" });
});

Deno.test("decodeText() follows UTF-16 byte-order marks in both byte orders", () => {
  const little = Uint8Array.of(0xff, 0xfe, 0xc5, 0x00, 0x73, 0x00);
  assert.deepEqual(decodeText(little, { source }), { text: "Ås", encoding: "utf-16le" });
  const big = Uint8Array.of(0xfe, 0xff, 0x00, 0xc5, 0x00, 0x73);
  assert.deepEqual(decodeText(big, { source }), { text: "Ås", encoding: "utf-16be" });
});

Deno.test("decodeText() obeys a named encoding", () => {
  // 0xb3 is ł in ISO 8859-2 and a superscript 3 in Windows-1252.
  assert.equal(decodeText(Uint8Array.of(0xb3), { source, encoding: "ISO-8859-2" }).text, "ł");
});

Deno.test("decodeText() rejects an unknown encoding, wrong bytes and binary data", () => {
  assert.throws(
    () => decodeText(Uint8Array.of(65), { source, encoding: "utf-9" }),
    fault(UsageError, /--encoding utf-9/),
  );
  assert.throws(
    () => decodeText(Uint8Array.of(0xf6), { source, encoding: "utf-8" }),
    fault(UnreadableError, /a\.csv as utf-8/),
  );
  assert.throws(
    () => decodeText(Uint8Array.of(65, 0, 66, 0), { source }),
    fault(UnreadableError, /--encoding utf-16le/),
  );
});

/**
 * HTML and SVG written as tagged templates in which every text is escaped by construction.
 *
 * @module
 */

/** Text that is markup already and goes in as it stands. */
export interface Markup {
  readonly markup: string;
}

/** What may stand in a template: text is escaped, lists are joined, null and false leave nothing. */
export type Part = string | number | Markup | null | false | readonly Part[];

/**
 * Markup from a template. Only what stands in the template itself is taken as markup; field names, ids
 * and all other text that comes in is escaped, for elements and for quoted attributes alike.
 *
 * @example
 * ```ts
 * import assert from "node:assert/strict";
 * assert.equal(markup`<b title="${'"'}">${"a < b"}</b>`.markup, '<b title="&quot;">a &lt; b</b>');
 * ```
 */
export function markup(strings: TemplateStringsArray, ...parts: readonly Part[]): Markup {
  let text = strings[0];
  parts.forEach((part, i) => text += written(part) + strings[i + 1]);
  return { markup: text };
}

/** Text taken as markup. For what this program wrote itself, such as path data; never for input. */
export function trusted(text: string): Markup {
  return { markup: text };
}

function written(part: Part): string {
  if (part === null || part === false) return "";
  if (typeof part === "number") return String(part);
  if (typeof part === "string") return escaped(part);
  return "markup" in part ? part.markup : part.map(written).join("");
}

const ENTITIES: Readonly<Record<string, string>> = {
  "&": "&amp;",
  "<": "&lt;",
  ">": "&gt;",
  '"': "&quot;",
  "'": "&#39;",
};

/** Control characters are no characters of XML, not even escaped, and would break an SVG file. */
// deno-lint-ignore no-control-regex
const CONTROLS = /[\u0000-\u0008\u000B\u000C\u000E-\u001F\uFFFE\uFFFF]/g;

function escaped(text: string): string {
  return text.toWellFormed().replace(CONTROLS, "\uFFFD").replace(/[&<>"']/g, (c) => ENTITIES[c]);
}

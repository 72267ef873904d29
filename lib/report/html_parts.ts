/**
 * The few forms that all parts of the page are made of.
 *
 * @module
 */
import { type Markup, markup, type Part, trusted } from "./markup.ts";
import { wholeText } from "./number_text.ts";

/** A part of the page with a heading that links can point at. */
export function section(id: string, title: string, ...content: Part[]): Markup {
  return markup`<section id="${id}" aria-labelledby="${id}-title">
<h2 id="${id}-title">${title}</h2>
${content}
</section>
`;
}

/** A drawn figure with its caption; nothing where it could not be drawn. */
export function figure(svg: string | undefined, caption: string): Markup | null {
  if (svg === undefined) return null;
  return markup`<figure>
${trusted(svg)}
<figcaption>${caption}</figcaption>
</figure>
`;
}

/** A term and what is said of it. */
export type Fact = readonly [term: string, fact: Part];

/** Facts in a list; null where there is nothing to say. */
export function facts(list: readonly (Fact | null)[]): Markup {
  const known = list.filter((fact) => fact !== null);
  return markup`<dl class="facts">
${known.map(([term, fact]) => markup`<div><dt>${term}</dt><dd>${fact}</dd></div>\n`)}</dl>
`;
}

/** A column of a table. */
export interface TableColumn {
  readonly title: string;
  /** Numbers stand at the right. @default false */
  readonly numbers?: boolean;
}

/** Longer tables scroll on a screen, under a head that stays. */
const MOST_AT_FULL_HEIGHT = 40;

/** A table with a caption; the first cell of each row names the row. */
export function table(
  caption: string,
  columns: readonly TableColumn[],
  rows: readonly (readonly Part[])[],
): Markup {
  const look = rows.length > MOST_AT_FULL_HEIGHT ? "table long" : "table";
  const kind = ({ numbers }: TableColumn) => numbers ? markup` class="number"` : null;
  return markup`<div class="${look}" role="region" aria-label="${caption}" tabindex="0">
<table>
<caption>${caption}</caption>
<thead><tr>${
    columns.map((column) => markup`<th scope="col"${kind(column)}>${column.title}</th>`)
  }</tr></thead>
<tbody>
${
    rows.map((cells) =>
      markup`<tr>${
        cells.map((cell, i) =>
          i === 0
            ? markup`<th scope="row"${kind(columns[i])}>${cell}</th>`
            : markup`<td${kind(columns[i])}>${cell}</td>`
        )
      }</tr>\n`
    )
  }</tbody>
</table>
</div>
`;
}

/** Names in a line, cut after some. */
export function nameList(names: readonly string[], total: number): string {
  const rest = total - names.length;
  return rest > 0 ? `${names.join(", ")} and ${wholeText(rest)} more` : names.join(", ");
}

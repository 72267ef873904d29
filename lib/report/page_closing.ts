/**
 * The end of the page: what no outcome can say, and how to make it again.
 *
 * @module
 */
import { section } from "./html_parts.ts";
import { type Markup, markup } from "./markup.ts";
import type { ReportInput } from "./report_input.ts";

/** Cautions that every outcome carries. */
export function cautionsSection({ cautions }: ReportInput): Markup {
  return section(
    "cautions",
    "Cautions",
    markup`<ul class="cautions">
${cautions.map(({ title, text }) => markup`<li><b>${title}</b>${text}</li>\n`)}</ul>
`,
  );
}

/** What lies beside the page, and how a reviewer gets the same numbers. */
export function rerunSection({ results }: ReportInput): Markup {
  return section(
    "rerun",
    "Files and rerunning",
    markup`<p>In the same folder: <code>areas.fgb</code> and <code>areas.csv</code> (every area with its results), <code>links.fgb</code> (who is whose neighbor), <code>results.json</code> (every number), <code>style.sld</code> (the classes as drawn here, for map viewers), and <code>plots/</code> (the figures).</p>
<p><code>record.json</code> holds the checksum of every input file, the version, its seed (<code>${results.seed}</code>) and every option as decided, defaults included. The same files with the same options give the same counts, p-values and classes in any engine, and the same bytes in the same engine. This page holds no date for that reason.</p>
`,
  );
}

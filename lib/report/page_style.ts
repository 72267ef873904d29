/**
 * The look of the page, on screens and on paper.
 *
 * @module
 */
import { CLASS_LOOKS, FRAGILE_STRENGTH } from "../write/class_looks.ts";
import { INK, SANS } from "./svg.ts";

const SERIF = "'Iowan Old Style', 'Palatino Linotype', Palatino, Georgia, 'Times New Roman', serif";

const high = CLASS_LOOKS["high among low"], low = CLASS_LOOKS["low among high"];

/** Style sheet of the page. Nothing in it is fetched. */
export const PAGE_STYLE = `
:root { color-scheme: light; }
* { box-sizing: border-box; }
body {
  margin: 0; background: #FFFFFF; color: ${INK.text};
  font: 16px/1.55 ${SANS}; font-variant-numeric: tabular-nums lining-nums;
  -webkit-print-color-adjust: exact; print-color-adjust: exact;
}
main, header, footer, nav { max-width: 1144px; margin: 0 auto; padding: 0 32px; }
header { padding-top: 44px; }
.source { margin: 0 0 18px; color: ${INK.muted}; font-size: 15px; }
.source b { color: ${INK.text}; letter-spacing: 0.02em; }
h1 { font: 600 38px/1.2 ${SERIF}; margin: 0 0 20px; max-width: 27em; text-wrap: balance; }
h2 { font: 600 26px/1.25 ${SERIF}; margin: 0 0 14px; }
h3 { font: 600 17px/1.35 ${SANS}; margin: 28px 0 8px; }
section { border-top: 1px solid ${INK.grid}; margin-top: 44px; padding-top: 30px; }
p, ul, ol { max-width: 72ch; margin: 0 0 14px; text-wrap: pretty; }
.lead { font: 19px/1.6 ${SERIF}; max-width: 40em; }
a { color: #3D5A80; }
nav ul { list-style: none; padding: 12px 0 0; margin: 0; display: flex; flex-wrap: wrap; gap: 4px 22px; max-width: none; font-size: 15px; }
.key { display: grid; grid-template-columns: repeat(auto-fit, minmax(190px, 1fr)); gap: 0 32px; margin: 30px 0 0; }
.key div { border-top: 3px solid ${INK.text}; padding: 12px 0 16px; }
.key dt { font-size: 14px; color: ${INK.muted}; }
.key dd { margin: 0; }
.key .large { font: 600 32px/1.25 ${SERIF}; }
.key .small { display: block; font-size: 14px; line-height: 1.45; color: ${INK.muted}; }
.warnings { border-left: 4px solid ${INK.mark}; background: #FBF4EE; margin: 30px 0 0; padding: 14px 20px; }
.warnings h2 { font: 600 16px/1.4 ${SANS}; margin: 0 0 4px; }
.warnings ul { margin: 0; padding-left: 18px; max-width: none; font-size: 15px; }
figure { margin: 0 0 22px; }
figure svg { display: block; max-width: 100%; height: auto; }
figcaption { color: ${INK.muted}; font-size: 14px; line-height: 1.5; max-width: 82ch; margin-top: 10px; }
.pair { display: grid; grid-template-columns: repeat(auto-fit, minmax(min(440px, 100%), 1fr)); gap: 12px 32px; }
.table { overflow: auto; margin: 16px 0 20px; }
.table.long { max-height: 40rem; border-bottom: 1px solid ${INK.axis}; }
table { border-collapse: collapse; font-size: 14px; line-height: 1.4; min-width: 60%; }
caption { text-align: left; color: ${INK.muted}; padding: 0 0 6px; }
thead th { position: sticky; top: 0; background: #FFFFFF; box-shadow: inset 0 -2px 0 ${INK.text}; vertical-align: bottom; }
th, td { text-align: left; white-space: nowrap; padding: 5px 18px 5px 0; font-weight: 400; vertical-align: top; }
thead th { font-weight: 600; white-space: normal; }
tbody th { white-space: normal; overflow-wrap: anywhere; min-width: 9em; max-width: 26em; }
tbody tr + tr > * { border-top: 1px solid ${INK.grid}; }
.number { text-align: right; }
.main-definition { font-weight: 600; }
.swatch { display: inline-block; width: 16px; height: 12px; margin-right: 8px; border: 1px solid; vertical-align: -1px; }
.c-high-among-high { background: ${CLASS_LOOKS["high among high"].fill}; border-color: ${
  CLASS_LOOKS["high among high"].ink
}; }
.c-low-among-low { background: ${CLASS_LOOKS["low among low"].fill}; border-color: ${
  CLASS_LOOKS["low among low"].ink
}; }
.c-high-among-low { background: repeating-linear-gradient(135deg, ${high.ink} 0 1px, ${high.fill} 1px 4px); border-color: ${high.ink}; }
.c-low-among-high { background: repeating-linear-gradient(45deg, ${low.ink} 0 1px, ${low.fill} 1px 4px); border-color: ${low.ink}; }
.is-fragile { opacity: ${FRAGILE_STRENGTH + 0.1}; border-style: dashed; }
.facts { margin: 0 0 18px; font-size: 15px; }
.facts div { display: grid; grid-template-columns: 13rem minmax(0, 72ch); gap: 0 24px; padding: 6px 0; }
.facts div + div { border-top: 1px solid ${INK.grid}; }
.facts dt { font-weight: 600; }
.facts dd { margin: 0; overflow-wrap: anywhere; }
.cautions { padding: 0; list-style: none; max-width: none; display: grid; grid-template-columns: repeat(auto-fit, minmax(300px, 1fr)); gap: 18px 40px; }
.cautions b { display: block; }
.references { font-size: 14px; padding-left: 20px; max-width: 100ch; }
code { font: 0.92em ui-monospace, 'Cascadia Mono', Menlo, Consolas, monospace; }
footer { color: ${INK.muted}; font-size: 14px; padding: 28px 32px 48px; }
@media (max-width: 640px) {
  h1 { font-size: 29px; }
  main, header, footer, nav { padding-left: 18px; padding-right: 18px; }
  .facts div { grid-template-columns: 1fr; }
}
@page { size: A4; margin: 15mm; }
@media print {
  body { font-size: 9.5pt; }
  nav { display: none; }
  main, header, footer { max-width: none; padding: 0; }
  h1 { font-size: 20pt; }
  h2 { font-size: 14pt; break-after: avoid; }
  h3 { font-size: 10.5pt; break-after: avoid; }
  .lead { font-size: 11pt; max-width: none; }
  section { margin-top: 16pt; padding-top: 12pt; }
  .source, .key dt, .key .small, figcaption, .facts, .warnings ul, .references, footer { font-size: 8.5pt; }
  .key { grid-template-columns: repeat(5, 1fr); gap: 0 14pt; }
  .key .large { font-size: 16pt; }
  .pair { grid-template-columns: 1fr 1fr; gap: 0 14pt; }
  .facts div { grid-template-columns: 8.5rem 1fr; padding: 3pt 0; }
  .table, .table.long { max-height: none; overflow: visible; border: 0; }
  table { font-size: 7.5pt; width: 100%; }
  thead th { position: static; box-shadow: none; border-bottom: 1.5pt solid ${INK.text}; }
  th, td { padding: 2pt 8pt 2pt 0; }
  figure, .key, .warnings, .cautions li, tr, .facts div { break-inside: avoid; }
  a { color: inherit; text-decoration: none; }
}
`;

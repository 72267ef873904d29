/**
 * The top of the page: the answer in words, the numbers it rests on, and what to mind.
 *
 * @module
 */
import { definitionsTried } from "../sweep/verdict_input.ts";
import { type Markup, markup } from "./markup.ts";
import { decimalText, pText, wholeText } from "./number_text.ts";
import type { ReportInput } from "./report_input.ts";

/** Headline, verdict and key numbers. */
export function pageHeader(input: ReportInput): Markup {
  const { layer, verdict, runs } = input.results;
  return markup`<header>
<p class="source"><b>nearkin</b> report on <b>${runs[0].indicator}</b> in ${
    layer.name === "" ? layer.source : `${layer.source}, layer ${layer.name}`
  }</p>
<h1>${verdict.headline}</h1>
<p class="lead">${verdict.sentences.join(" ")}</p>
${keyNumbers(input)}${warningBox(input)}</header>
`;
}

interface KeyNumber {
  readonly title: string;
  readonly large: string;
  readonly small: string;
}

function keyNumbers(input: ReportInput): Markup {
  const numbers = [
    globalNumber(input),
    jointNumber(input),
    flaggedNumber(input),
    steadyNumber(input),
    usedNumber(input),
  ].filter((number) => number !== null);
  return markup`<dl class="key" aria-label="Key numbers">
${
    numbers.map(({ title, large, small }) =>
      markup`<div><dt>${title}</dt><dd><span class="large">${large}</span><span class="small">${small}</span></dd></div>\n`
    )
  }</dl>
`;
}

function globalNumber({ results }: ReportInput): KeyNumber {
  const { global: { moranI }, local } = results.runs[0];
  return {
    title: "Moran's I",
    large: decimalText(moranI.value, 3),
    small: `${decimalText(moranI.expected, 3)} expected by chance; p\u00A0=\u00A0${
      pText(moranI.p, local.level)
    }`,
  };
}

function jointNumber({ results }: ReportInput): KeyNumber | null {
  const { sweep, runs } = results;
  if (sweep === null) return null;
  const { p, smallest, largest } = sweep.joint;
  return {
    title: "Joint p",
    large: pText(p, runs[0].local.level),
    small: `over ${definitionsTried(sweep)} definitions of neighbor; I from ${
      decimalText(smallest)
    } to ${decimalText(largest)}`,
  };
}

function flaggedNumber({ results }: ReportInput): KeyNumber {
  const { significant, tested, level, adjust } = results.runs[0].local;
  const adjusted = adjust === "none" ? "not adjusted" : "adjusted for their number";
  return {
    title: "Areas that stand out",
    large: wholeText(significant),
    small: `of ${wholeText(tested)} tested at level ${level}, ${adjusted}`,
  };
}

function steadyNumber({ results }: ReportInput): KeyNumber | null {
  const { sweep, runs } = results;
  if (sweep === null || runs[0].local.significant === 0) return null;
  return {
    title: "Steady among these",
    large: wholeText(sweep.stability.flaggedSteady),
    small: "same class under at least 80\u00A0% of the definitions",
  };
}

function usedNumber({ results }: ReportInput): KeyNumber {
  const { used, features } = results.layer;
  return {
    title: "Areas used",
    large: wholeText(used),
    small: used === features
      ? "all areas of the layer"
      : `of ${wholeText(features)} in the layer; the others are counted below`,
  };
}

function warningBox({ results: { warnings } }: ReportInput): Markup | null {
  if (warnings.length === 0) return null;
  return markup`<aside class="warnings" aria-labelledby="warnings-title">
<h2 id="warnings-title">Before anyone quotes these numbers</h2>
<ul>${warnings.map((warning) => markup`<li>${warning}</li>`)}</ul>
</aside>
`;
}

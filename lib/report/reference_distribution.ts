/**
 * Where the observed Moran's I stands among those of the permuted maps.
 *
 * @module
 */
import type { ReferenceDistribution } from "../write/results.ts";
import { bottomAxis, leftAxis, type LinearScale, linearScale, type PlotArea } from "./axes.ts";
import { type Markup, markup } from "./markup.ts";
import { decimalText, wholeText } from "./number_text.ts";
import type { ReportInput } from "./report_input.ts";
import { INK, short, svgFigure, svgLine, svgText } from "./svg.ts";

const SIZE = { width: 524, height: 330 } as const;
const PLOT: PlotArea = { left: 62, top: 62, right: 510, bottom: 274 };

/** Farther out than this many times the range of the bins, the observed I is only pointed at. */
const FARTHEST_DRAWN = 6;

type Bins = NonNullable<ReferenceDistribution["bins"]>;

/**
 * Draws the histogram of Moran's I over the permutations with the observed and the expected I.
 *
 * @returns Null where all permutations gave the same I, so that there is nothing to compare with.
 */
export function referenceHistogram({ results }: ReportInput): Markup | null {
  const { reference, global: { moranI } } = results.runs[0];
  const { bins } = reference;
  const { value, expected, permutations, enumerated } = moranI;
  if (bins === null || value === null || expected === null) return null;
  const far = isFarOut(bins, value);
  const marked = far ? [expected] : [value, expected];
  const x = linearScale(domainOf(bins, marked), [PLOT.left, PLOT.right]);
  const y = linearScale([0, Math.max(...bins.counts) * 1.05], [PLOT.bottom, PLOT.top]);
  const maps = enumerated ? "arrangements" : "permutations";
  return svgFigure(
    {
      label: `Histogram of Moran's I over ${wholeText(permutations)} ${maps}, around ${
        decimalText(reference.mean, 3)
      }. Observed: ${decimalText(value, 3)}`,
      ...SIZE,
    },
    centralBand(reference, x),
    leftAxis(y, PLOT, { title: `Number of ${maps}`, ticks: 5, grid: true }),
    bars(bins, x, y),
    bottomAxis(x, PLOT, { title: "Moran's I" }),
    marker({ at: expected, text: `expected ${decimalText(expected, 3)}`, top: 44 }, x),
    far
      ? pointer(value, reference)
      : marker({ at: value, text: `observed ${decimalText(value, 3)}`, top: 20, strong: true }, x),
  );
}

/** Whether the observed I lies so far out that the bins would shrink to a line beside it. */
function isFarOut({ start, width, counts }: Bins, value: number): boolean {
  const range = width * counts.length;
  const distance = Math.max(start - value, value - (start + range));
  return distance > FARTHEST_DRAWN * range;
}

/** All bins and marked values, with some room. */
function domainOf({ start, width, counts }: Bins, marked: readonly number[]): [number, number] {
  const end = start + width * counts.length;
  const low = Math.min(start, ...marked), high = Math.max(end, ...marked);
  const room = 0.05 * (high - low);
  return [low - room, high + room];
}

function bars({ start, width, counts }: Bins, x: LinearScale, y: LinearScale): Markup {
  const outline = counts.map((count, bin) => {
    const left = short(x(start + width * bin)), right = short(x(start + width * (bin + 1)));
    const top = short(y(count));
    return count === 0 ? "" : `M${left} ${PLOT.bottom}V${top}H${right}V${PLOT.bottom}z`;
  });
  return markup`<path d="${outline.join("")}" fill="#B9B2A6"/>`;
}

/** The middle 95 % of the permutations. */
function centralBand({ quantiles }: ReferenceDistribution, x: LinearScale): Markup | null {
  const low = quantiles.find(({ at }) => at === 0.025);
  const high = quantiles.find(({ at }) => at === 0.975);
  if (!low || !high) return null;
  const left = short(x(low.value)), width = short(x(high.value) - x(low.value));
  return markup`<rect x="${left}" y="${PLOT.top}" width="${width}" height="${
    PLOT.bottom - PLOT.top
  }" fill="#F3EFE8"/>`;
}

/** A line at a value with its name above. */
function marker(
  mark: { readonly at: number; readonly text: string; readonly top: number; strong?: boolean },
  x: LinearScale,
): Markup {
  const place = x(mark.at);
  const color = mark.strong ? INK.mark : INK.text;
  const isRight = place > (PLOT.left + PLOT.right) / 2;
  return markup`${
    svgLine([place, mark.top - 10], [place, PLOT.bottom], {
      stroke: color,
      width: mark.strong ? 2.5 : 1.2,
      dash: mark.strong ? undefined : "5 3",
    })
  }${
    svgText(place + (isRight ? -7 : 7), mark.top, mark.text, {
      anchor: isRight ? "end" : "start",
      fill: color,
      weight: mark.strong ? 600 : 400,
      halo: "#FFFFFF",
    })
  }`;
}

/** Says where the observed I is, at the side of the plot beyond which it lies. */
function pointer(value: number, { mean, sd }: ReferenceDistribution): Markup {
  const above = value > (mean ?? 0);
  const tip = above ? PLOT.right : PLOT.left, back = above ? -9 : 9;
  const away = sd
    ? `, ${wholeText(Math.abs(value - (mean ?? 0)) / sd)} standard deviations away`
    : "";
  return markup`<path d="M${tip} 15l${back} -6v12z" fill="${INK.mark}"/>${
    svgText(tip + 2 * back, 20, `observed ${decimalText(value, 3)}${away}`, {
      anchor: above ? "end" : "start",
      fill: INK.mark,
      weight: 600,
    })
  }`;
}

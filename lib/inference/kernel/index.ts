/** What the kernel offers; compiled to WebAssembly by `deno task kernel`. */

export { sumPairs } from "./pairs";
export { rankAreas } from "./rank";
export { drawRankedBlock } from "./ranked";
export { interleave, putInPlace, shuffleColumn } from "./shuffle";
export { sortDoubles } from "./sort";
export { dealBlock, takeOwnAreasOut, weighBlock } from "./weighed";

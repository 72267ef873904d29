/**
 * Names and colors of the families of neighbor definitions.
 *
 * @module
 */
import type { Family } from "../write/results.ts";

/** How a family is called and drawn. */
export interface FamilyLook {
  readonly title: string;
  readonly color: string;
}

/** Looks of all families, in the order in which figures and tables list them. */
export const FAMILY_LOOKS: Readonly<Record<Family, FamilyLook>> = {
  contiguity: { title: "Shared boundaries", color: "#3D5A80" },
  nearest: { title: "Nearest areas", color: "#B0712A" },
  band: { title: "Distance bands", color: "#5C7A29" },
  graph: { title: "Graphs on the points", color: "#7A5AA6" },
  weighted: { title: "Weighted by distance", color: "#A8443E" },
  links: { title: "Given links", color: "#57534B" },
};

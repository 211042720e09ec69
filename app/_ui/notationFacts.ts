/** The engine's own tables of faults and limits, for the page that explains the notation. */
export { codes } from "../../engine/notation/codes";
export {
  deepestNesting,
  fewestLegs,
  largestExponent,
  longestInteger,
  mostLegs,
  mostLoops,
  mostSourceUnits,
  mostTerms,
} from "../../engine/notation/limits";

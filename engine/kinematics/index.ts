/** Kinematic points and what is measured on them: brackets, meets with their Grassmann parts, spinors, and maps of points. */
export { determinant } from "./determinant";
export {
  bracket,
  type Line,
  lineBracket,
  lineThrough,
  meetOfLineAndPlane,
  meetOfPlanes,
  type Plane,
  planeAt,
  planeOf,
  planeThrough,
} from "./incidence";
export { barLabels, cyclicRange, wrapLabel } from "./labels";
export { type AmplitudeSize, publicPoint, randomPoint, sizeKey } from "./makePoint";
export {
  exchangeLoops,
  mapPoint,
  mixLine,
  reflectPoint,
  relabelPoint,
  replaceReferences,
  rotatePoint,
  transformPoint,
} from "./maps";
export type { GrassmannVectors, Point, Twistor } from "./point";
export { type PointUse, readPoints } from "./readPoints";
export {
  angle,
  dualDistance,
  dualPointOfLeg,
  lambdaOf,
  lambdaTilde,
  type Momentum,
  momentumSquared,
  muOf,
  type Spinor,
  spinorBracket,
  spinorString,
  squareContractions,
  totalMomentum,
} from "./spinors";
export { combineChi, leg, meet, type Superline, type Superplane, type Supertwistor } from "./supertwistor";

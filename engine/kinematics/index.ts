/** Kinematic points and what is measured on them: brackets, meets with their Grassmann parts, spinors, momenta, and maps of points. */
export { checkMomenta, fewestMomenta, nearSingular } from "./checkMomenta";
export { determinant } from "./determinant";
export {
  balancedSpinors,
  type LegSpinors,
  momentaOfTwistors,
  rationalSpinors,
  spinorsOfTwistors,
  twistorsOfMomenta,
  twistorsOfSpinors,
} from "./fromMomenta";
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
export {
  addMomenta,
  bispinorOf,
  doubleSpacetime,
  exactSpacetime,
  type FourMomentum,
  fourMomentumOf,
  massSquared,
  momentumTolerance,
  type Signature,
  type Spacetime,
  signatures,
} from "./momenta";
export { flatMomenta, phaseSpaceVolume, scatteringPoint } from "./phaseSpace";
export type { GrassmannVectors, Point, Twistor } from "./point";
export { rationalMomenta } from "./rationalMomenta";
export { type MomentaDocument, readMomenta } from "./readMomenta";
export { type PointUse, readComplexPoints, readPoints } from "./readPoints";
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

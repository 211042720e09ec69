/** The marks that a check sets, one file each. `constraint` marks are those every amplitude has: a failure refuses the form. */
import type { Bench } from "../bench";
import type { Mark, MarkCode } from "../report";
import { collinear } from "./collinear";
import { cyclic } from "./cyclic";
import { dualConformal } from "./dualConformal";
import { factorisation } from "./factorisation";
import { lineIndependent } from "./lineIndependent";
import { localPoles } from "./localPoles";
import { logarithmic } from "./logarithmic";
import { logTest } from "./logTest";
import { loopExchange } from "./loopExchange";
import { oneSign } from "./oneSign";
import { parity } from "./parity";
import { ratioTest } from "./ratioTest";
import { referenceIndependent } from "./referenceIndependent";
import { reflection } from "./reflection";
import { soft } from "./soft";
import { spuriousCancel } from "./spuriousCancel";
import { termsOneSign } from "./termsOneSign";
import { twoParticleCuts } from "./twoParticleCuts";
import { unitLeadingSingularities } from "./unitLeadingSingularities";

export interface MarkCheck {
  readonly code: MarkCode;
  /** What the mark says where it holds, for people: completes "This form ...". */
  readonly says: string;
  readonly constraint: boolean;
  readonly run: (bench: Bench) => Mark;
}

export const markChecks: readonly MarkCheck[] = [
  { code: "cyclic", says: "is unchanged when the legs are rotated", constraint: true, run: cyclic },
  {
    code: "reflection",
    says: "is unchanged when the order of the legs is reversed",
    constraint: true,
    run: reflection,
  },
  { code: "loopExchange", says: "is symmetric in the loop lines", constraint: true, run: loopExchange },
  {
    code: "referenceIndependent",
    says: "does not depend on its references",
    constraint: true,
    run: referenceIndependent,
  },
  {
    code: "lineIndependent",
    says: "depends on the loop lines only, not on the points that span them",
    constraint: true,
    run: lineIndependent,
  },
  { code: "dualConformal", says: "is dual conformally invariant", constraint: true, run: dualConformal },
  { code: "localPoles", says: "has only physical poles in its denominators", constraint: false, run: localPoles },
  {
    code: "spuriousCancel",
    says: "has no pole in its sum that is not physical",
    constraint: true,
    run: spuriousCancel,
  },
  { code: "soft", says: "has the soft limit of an amplitude", constraint: true, run: soft },
  { code: "collinear", says: "has the collinear limits of an amplitude", constraint: true, run: collinear },
  {
    code: "factorisation",
    says: "factorises on its poles into smaller amplitudes",
    constraint: true,
    run: factorisation,
  },
  { code: "parity", says: "goes to the conjugate amplitude under parity", constraint: true, run: parity },
  {
    code: "twoParticleCuts",
    says: "has two-particle cuts that are products of lower amplitudes",
    constraint: true,
    run: twoParticleCuts,
  },
  {
    code: "unitLeadingSingularities",
    says: "has the leading singularities of an amplitude",
    constraint: true,
    run: unitLeadingSingularities,
  },
  { code: "logTest", says: "has a logarithm that is less divergent", constraint: true, run: logTest },
  {
    code: "ratioTest",
    says: "is less divergent once its tree times the MHV integrand is subtracted",
    constraint: true,
    run: ratioTest,
  },
  { code: "logarithmic", says: "has logarithmic singularities only", constraint: false, run: logarithmic },
  { code: "oneSign", says: "has one sign on positive kinematics", constraint: false, run: oneSign },
  {
    code: "termsOneSign",
    says: "is a sum of terms of one sign on positive kinematics",
    constraint: false,
    run: termsOneSign,
  },
];

/** What a finished run does to the library, in one transaction. */
import { createHash } from "node:crypto";
import type { Report, Verdict } from "../../../engine/checks/report";
import type { VersionState } from "../../_contract";
import { type Transaction, write } from "../db";
import { manyKey } from "../identifiers";
import { acceptedBeside } from "./beside";
import { type Claim, ended, heldBy, placeOf } from "./queue";

const stateAfter: Record<Verdict, VersionState> = {
  agrees: "accepted",
  disagrees: "refused",
  unreadable: "refused",
  undecided: "held",
};

export interface Run {
  readonly report: Report;
  readonly protocol: string;
  readonly engine: string;
}

/**
 * Stores the result of `claim`. "late": another worker has taken the job up since; nothing is stored. "extended": a form was accepted
 * meanwhile that this one was not compared with; nothing is stored and the check is queued again, to be compared with it too.
 */
export async function finish(claim: Claim, run: Run): Promise<"done" | "late" | "extended"> {
  const { certificate, ...report } = run.report;
  const reportText = JSON.stringify(report);
  const certificateText = certificate ? JSON.stringify(certificate) : null;
  const compared = new Set(claim.accepted.map((other) => other.digest));
  return write(async (transaction) => {
    const { count } = await transaction.job.updateMany({ where: heldBy(claim), data: ended("done") });
    if (count === 0) return "late";
    const check = await transaction.check.findUniqueOrThrow({
      where: { id: claim.checkId },
      include: { version: { include: { form: { include: { amplitude: true } } } } },
    });
    const { version } = check;
    if (version && report.verdict === "agrees") {
      // Acceptances with the same k and loops pass here one after the other.
      const key = manyKey(version.form.amplitude);
      await transaction.amplitude.update({ where: { key }, data: { revision: { increment: 1 } } });
      const beside = await acceptedBeside(transaction, placeOf(version));
      if (beside.some((other) => !compared.has(other.digest))) {
        await transaction.job.update({
          where: { checkId: claim.checkId },
          data: { state: "queued", stage: "waiting", priority: { increment: 1 } },
        });
        return "extended";
      }
    }
    await transaction.check.update({
      where: { id: claim.checkId },
      data: {
        protocol: run.protocol,
        engine: run.engine,
        comparedDigests: JSON.stringify([...compared].sort()),
        verdict: report.verdict,
        report: reportText,
        certificate: certificateText,
        finishedAt: new Date(),
      },
    });
    await storeComparisons(transaction, claim, report);
    if (version) await storeVersion(transaction, version.id, version.form, report);
    return "done";
  });
}

async function storeComparisons(transaction: Transaction, claim: Claim, report: Report): Promise<void> {
  const versionOf = new Map(claim.accepted.map((other) => [other.name, other.versionId]));
  await transaction.comparison.createMany({
    data: report.comparisons.map((comparison, no) => ({
      checkId: claim.checkId,
      no,
      kind: comparison.kind,
      with: comparison.with,
      versionId: versionOf.get(comparison.with) ?? null,
      agrees: comparison.agrees,
      points: comparison.points,
      primes: comparison.primes,
      bound: comparison.bound ?? null,
      n: comparison.n ?? null,
    })),
  });
}

async function storeVersion(
  transaction: Transaction,
  versionId: string,
  form: {
    readonly amplitudeKey: string;
    readonly component: string;
    readonly visibility: string;
    readonly groupId: string;
  },
  report: Report,
): Promise<void> {
  const state = stateAfter[report.verdict];
  await transaction.version.update({
    where: { id: versionId },
    data: {
      state,
      basis: state === "accepted" ? "verified" : null,
      terms: report.terms ?? null,
      spurious: report.poles.filter((pole) => pole.kind === "spurious").length,
    },
  });
  await transaction.mark.deleteMany({ where: { versionId } });
  await transaction.mark.createMany({
    data: Object.entries(report.marks).map(([code, mark]) => ({
      versionId,
      code,
      state: mark.state,
      manifest: mark.manifest ?? null,
      subgroup: mark.subgroup ?? null,
      evidence: mark.evidence,
    })),
  });
  if (state !== "accepted" || report.fingerprint === undefined) return;
  // For many n the fingerprint is that of one n, under whose key it is found.
  const key = report.at === undefined ? form.amplitudeKey : form.amplitudeKey.replace("nX", `n${report.at}`);
  const row = {
    scope: form.visibility === "public" ? "public" : form.groupId,
    key,
    component: form.component,
    hash: createHash("sha256").update(report.fingerprint).digest("hex").slice(0, 32),
  };
  const id = { versionId, normalisation: "exact", term: -1 };
  await transaction.fingerprint.upsert({
    where: { versionId_normalisation_term: id },
    create: { ...row, ...id },
    update: row,
  });
}

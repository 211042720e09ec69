/** Which accepted forms a form must be compared with. */
import type { Transaction } from "../db";
import { formIdOf } from "../identifiers";

/** What of a form decides which others stand beside it. */
export interface Place {
  readonly k: number;
  readonly loops: number;
  readonly rangeFrom: number;
  readonly rangeTo: number;
  readonly component: string;
  readonly target: string;
  /** Null: not stored. */
  readonly versionId: string | null;
  readonly visibility: string;
  readonly groupId: string;
}

export interface Beside {
  readonly versionId: string;
  /** Identifier of the version. */
  readonly name: string;
  readonly digest: string;
}

/**
 * The accepted versions with the same k, loops, component and target whose n overlap: at one n the same amplitude. Only what rests on a
 * check (`verified`) serves as truth, and a public form is compared with public forms only. Sorted by their place in the library.
 */
export async function acceptedBeside(database: Pick<Transaction, "version">, place: Place): Promise<Beside[]> {
  const scope =
    place.visibility === "public"
      ? { visibility: "public" }
      : { OR: [{ visibility: "public" }, { groupId: place.groupId }] };
  const rows = await database.version.findMany({
    where: {
      state: "accepted",
      basis: "verified",
      ...(place.versionId === null ? {} : { id: { not: place.versionId } }),
      form: {
        amplitude: { k: place.k, loops: place.loops },
        rangeFrom: { lte: place.rangeTo },
        rangeTo: { gte: place.rangeFrom },
        component: place.component,
        target: place.target,
        ...scope,
      },
    },
    select: { id: true, no: true, digest: true, form: { select: { amplitudeKey: true, number: true, handle: true } } },
    orderBy: [{ form: { position: "asc" } }, { no: "asc" }],
  });
  return rows.map(({ id, no, digest, form }) => ({ versionId: id, name: `${formIdOf(form)}v${no}`, digest }));
}

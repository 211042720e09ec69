/** Lists forms, filtered and in pages. */
import { type FormList, type FormListQuery, formListQuerySchema } from "../../_contract";
import { read } from "../db";
import { answer, type Outcome, refuse } from "../outcome";
import { type Principal, visibleTo } from "../principal";
import { searchable } from "./entry";
import { summaryOf, summaryParts } from "./view";

/** Forms on a page where the caller does not say. */
const usualLimit = 50;

const encodeCursor = (position: string): string => Buffer.from(position).toString("base64url");

function decodeCursor(cursor: string): string | null {
  const position = Buffer.from(cursor, "base64url").toString();
  return /^\d{17}[a-z2-7]*$/.test(position) && encodeCursor(position) === cursor ? position : null;
}

/**
 * The latest versions of the forms that `principal` may read and for which every filter of `query` holds, by loop order, n, k and number.
 * `next` continues after the last one; a form that comes in between later is neither missed nor shown twice.
 */
export async function listForms(principal: Principal, query: FormListQuery): Promise<Outcome<FormList>> {
  const parsed = formListQuerySchema.safeParse(query);
  if (!parsed.success)
    return refuse(
      "bad-request",
      parsed.error.issues.map((issue) => `${issue.path.join(".") || "query"}: ${issue.message}`).join("; "),
    );
  const { amplitude, mark, method, state, q, cursor, limit = usualLimit } = parsed.data;
  const after = cursor === undefined ? null : decodeCursor(cursor);
  if (cursor !== undefined && after === null)
    return refuse(
      "bad-cursor",
      "Use the cursor that the list gave as `next`, or leave it out to begin at the beginning.",
    );
  const words = searchable(q ?? "")
    .split(/\s+/)
    .filter((word) => word !== "");
  const rows = await read().version.findMany({
    where: {
      latest: true,
      OR: [{ state: "accepted" }, { form: { groupId: { in: [...principal.groups] } } }],
      form: {
        ...visibleTo(principal),
        ...(amplitude === undefined ? {} : { amplitudeKey: amplitude }),
        ...(after === null ? {} : { position: { gt: after } }),
      },
      ...(state === undefined ? {} : { state }),
      ...(method === undefined ? {} : { method }),
      ...(mark === undefined ? {} : { marks: { some: { code: mark, state: "holds" } } }),
      AND: words.map((word) => ({ searchText: { words: { contains: word } } })),
    },
    include: summaryParts,
    orderBy: { form: { position: "asc" } },
    take: limit + 1,
  });
  const page = rows.slice(0, limit);
  const last = page.at(-1);
  return answer({
    items: page.map(summaryOf),
    next: rows.length > limit && last ? encodeCursor(last.form.position) : null,
  });
}

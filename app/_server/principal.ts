/** Who asks. Every domain function takes one first and decides itself what it may see and do. */

export interface Principal {
  readonly userId: string;
  /** Groups whose private forms it may see and to which it may submit. */
  readonly groups: readonly string[];
}

/** The one user of a server without accounts: whoever can reach the loopback address of this machine. */
export const localUser: Principal = { userId: "local", groups: ["local"] };

/** The group that forms belong to until there are accounts. */
export const localGroup = "local";

/** Which forms `principal` may see: the scope filter of every query, applied before ranking, counting and limits. */
export const visibleTo = (principal: Principal) => ({
  OR: [{ visibility: "public" }, { groupId: { in: [...principal.groups] } }],
});

/** The versions it may read whole: accepted public ones and everything of its own groups. The rest of a public form is a tombstone. */
export const mayRead = (
  principal: Principal,
  form: { readonly visibility: string; readonly groupId: string },
  state: string,
): boolean => principal.groups.includes(form.groupId) || (form.visibility === "public" && state === "accepted");

/** A write that is sent twice under one key is done once and answered twice alike. */
import type { Transaction } from "./db";
import { answer, type Outcome, refuse } from "./outcome";
import type { Principal } from "./principal";

export interface Repeatable {
  readonly principal: Principal;
  readonly route: string;
  /** Absent: every call counts. */
  readonly key: string | undefined;
  readonly bodyHash: string;
}

/** Null if `key` can serve: 1 to 255 visible ASCII characters. */
export const faultOfKey = (key: string | undefined): Outcome<never> | null =>
  key === undefined || /^[\x21-\x7e]{1,255}$/.test(key)
    ? null
    : refuse("bad-idempotency-key", "An Idempotency-Key has 1 to 255 visible ASCII characters, without blanks.");

/**
 * Runs `work` unless the same call was answered before, and remembers its answer in the same transaction: the answer is there exactly if
 * the work is. Of two calls at once one waits for the other's commit and then repeats its answer.
 */
export async function once<T>(
  transaction: Transaction,
  { principal, route, key, bodyHash }: Repeatable,
  work: () => Promise<T>,
): Promise<Outcome<T>> {
  if (key === undefined) return answer(await work());
  const userId = principal.userId;
  const before = await transaction.idempotency.findUnique({ where: { userId_route_key: { userId, route, key } } });
  if (before) {
    return before.bodyHash === bodyHash
      ? answer(JSON.parse(before.reply) as T)
      : refuse(
          "idempotency-key-reused",
          "This Idempotency-Key came before with another body. Send a new key with a new body.",
        );
  }
  const reply = await work();
  await transaction.idempotency.create({ data: { userId, route, key, bodyHash, reply: JSON.stringify(reply) } });
  return answer(reply);
}

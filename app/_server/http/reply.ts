/** Turns what the domain answers into HTTP: JSON, problem documents, and one place where unforeseen errors end. */
import type { Problem, ProblemCode } from "../../_contract";
import { type Outcome, problemOf } from "../outcome";
import { localUser, type Principal } from "../principal";

/** Content that depends on who asks and changes with every check. */
const unstored = { "cache-control": "no-store" };

export const json = (value: unknown, status = 200, headers: Record<string, string> = {}): Response =>
  new Response(JSON.stringify(value), {
    status,
    headers: { "content-type": "application/json; charset=utf-8", ...unstored, ...headers },
  });

/** A text to be saved under `name`. */
export const file = (text: string, mediaType: string, name: string): Response =>
  new Response(text, {
    headers: { "content-type": mediaType, "content-disposition": `attachment; filename="${name}"`, ...unstored },
  });

export const problemReply = (problem: Problem): Response =>
  new Response(JSON.stringify(problem), {
    status: problem.status,
    headers: { "content-type": "application/problem+json; charset=utf-8", ...unstored },
  });

export const problem = (code: ProblemCode, detail: string): Response => problemReply(problemOf(code, detail));

/** The value of an outcome as JSON with `status`, or its problem. */
export const outcome = <T>(result: Outcome<T>, status = 200): Response =>
  result.ok ? json(result.value, status) : problemReply(result.problem);

/** Who asks: until there are accounts the local user; the proxy has made sure that the request comes from this machine. */
export const principalOf = (_request: Request): Principal => localUser;

export const idempotencyKeyOf = (request: Request): string | undefined =>
  request.headers.get("idempotency-key") ?? undefined;

type Parameters = Record<string, string>;

/** A route handler: an error that nobody foresaw is logged and answered as a problem, never with its stack. */
export const route =
  (handler: (request: Request, principal: Principal, parameters: Parameters) => Promise<Response>) =>
  async (request: Request, context: { params: Promise<unknown> }): Promise<Response> => {
    try {
      return await handler(request, principalOf(request), (await context.params) as Parameters);
    } catch (error) {
      console.error("equiform: a request failed:", error);
      return problem("internal", "Something went wrong here, not in your request. The server's log has the details.");
    }
  };

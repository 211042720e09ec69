/** Keeps other sites and other machines out while the server has no accounts. */
import type { ProblemCode } from "../../_contract";

const loopback = new Set(["localhost", "127.0.0.1", "[::1]"]);
const safe = new Set(["GET", "HEAD", "OPTIONS"]);

/**
 * Null if a request may pass. The Host must be this machine's loopback name with the server's port: a foreign name that points here (DNS
 * rebinding) is refused. A writing request of a browser must come from the server's own pages; command-line callers send no Origin.
 */
export function faultOfRequest(
  request: { readonly method: string; readonly headers: Headers },
  port: number,
): { code: ProblemCode; detail: string } | null {
  const host = (request.headers.get("host") ?? "").toLowerCase();
  const [, name, given] = /^(\[[^\]]*\]|[^:]*)(?::(\d+))?$/.exec(host) ?? [];
  if (name === undefined || !loopback.has(name) || Number(given ?? 80) !== port)
    return {
      code: "foreign-host",
      detail: `Use http://localhost:${port}; this server answers on the loopback address only.`,
    };
  if (safe.has(request.method)) return null;
  const origin = request.headers.get("origin");
  if (origin !== null && origin !== `http://${host}`)
    return { code: "foreign-origin", detail: "Only the server's own pages and command-line callers may write here." };
  const site = request.headers.get("sec-fetch-site");
  if (site !== null && site !== "same-origin" && site !== "none")
    return { code: "foreign-origin", detail: "Only the server's own pages and command-line callers may write here." };
  return null;
}

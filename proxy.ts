/** Before every request: is it from this machine and its own pages, and under which content security policy is it answered. */
import { type NextRequest, NextResponse } from "next/server";
import { environment } from "./app/_server/env";
import { faultOfRequest } from "./app/_server/http/origin";
import { contentSecurityPolicy } from "./app/_server/http/policy";
import { problemReply } from "./app/_server/http/reply";
import { problemOf } from "./app/_server/outcome";

export function proxy(request: NextRequest): Response {
  const fault = faultOfRequest(request, environment().port);
  if (fault) return problemReply(problemOf(fault.code, fault.detail));
  const nonce = Buffer.from(crypto.getRandomValues(new Uint8Array(16))).toString("base64");
  const policy = contentSecurityPolicy(nonce, process.env.NODE_ENV === "development");
  // Next reads the nonce for its own scripts from the policy on the request; pages read `x-nonce`.
  const headers = new Headers(request.headers);
  headers.set("x-nonce", nonce);
  headers.set("content-security-policy", policy);
  const response = NextResponse.next({ request: { headers } });
  response.headers.set("content-security-policy", policy);
  response.headers.set("x-content-type-options", "nosniff");
  response.headers.set("referrer-policy", "strict-origin-when-cross-origin");
  response.headers.set("cross-origin-opener-policy", "same-origin");
  response.headers.set("cross-origin-resource-policy", "same-origin");
  return response;
}

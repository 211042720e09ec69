/** Reads the JSON body of a request within limits. */
import { answer, type Outcome, refuse } from "../outcome";

/** Bytes of a body: an entry document of the longest notation, with its escapes, fits. */
export const largestBody = 4 * 1024 * 1024;

/** Depth of brackets: entry documents have four; deeper ones would only exhaust the stack of whatever walks them. */
const deepest = 64;

const tooLarge = () => refuse("too-large", `A body may have at most ${largestBody} bytes.`);

/** The body as a JSON value. Refused unless it is declared as JSON, is UTF-8, is not too large or too deep, and parses. */
export async function readJsonBody(request: Request): Promise<Outcome<unknown>> {
  const type = request.headers.get("content-type") ?? "";
  // Also what keeps a form on another site from writing here: such a form cannot send this type.
  if (!/^application\/(json|[a-z0-9.+-]+\+json)\s*(;|$)/i.test(type))
    return refuse("unsupported-media-type", "Send the document with Content-Type: application/json.");
  if (Number(request.headers.get("content-length") ?? 0) > largestBody) return tooLarge();
  const bytes = await collect(request);
  if (bytes === null) return tooLarge();
  let text: string;
  try {
    text = new TextDecoder("utf-8", { fatal: true, ignoreBOM: true }).decode(bytes);
  } catch {
    return refuse("not-json", "The body is not UTF-8.");
  }
  const depth = depthOf(text);
  if (depth > deepest) return refuse("not-json", `The body nests brackets ${depth} deep; at most ${deepest} are read.`);
  try {
    return answer(JSON.parse(text) as unknown);
  } catch (error) {
    return refuse("not-json", `The body does not parse as JSON: ${(error as Error).message}`);
  }
}

async function collect(request: Request): Promise<Uint8Array | null> {
  const reader = request.body?.getReader();
  if (!reader) return new Uint8Array();
  const parts: Uint8Array[] = [];
  let length = 0;
  for (;;) {
    const { done, value } = await reader.read();
    if (done) break;
    length += value.length;
    if (length > largestBody) {
      await reader.cancel();
      return null;
    }
    parts.push(value);
  }
  const bytes = new Uint8Array(length);
  let at = 0;
  for (const part of parts) {
    bytes.set(part, at);
    at += part.length;
  }
  return bytes;
}

/** Greatest number of brackets open at once outside strings. */
function depthOf(text: string): number {
  let depth = 0;
  let greatest = 0;
  let inString = false;
  for (let i = 0; i < text.length; i++) {
    const c = text[i];
    if (inString) {
      if (c === "\\") i++;
      else if (c === '"') inString = false;
    } else if (c === '"') inString = true;
    else if (c === "[" || c === "{") greatest = Math.max(greatest, ++depth);
    else if (c === "]" || c === "}") depth--;
  }
  return greatest;
}

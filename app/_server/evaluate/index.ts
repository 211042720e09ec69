/** Values of forms at points: kept forms and entry documents, for one gluon component or all. */
import { randomBytes } from "node:crypto";
import { z } from "zod";
import { allHelicities, countHelicities, readHelicities } from "../../../engine/evaluate";
import { type Form, readEntryValue } from "../../../engine/notation";
import { type EvaluateReply, evaluateRequestSchema, mostPoints, mostValuesHere } from "../../_contract";
import { compute, type EvaluateTask } from "../compute";
import { getEntry } from "../forms";
import { answer, type Outcome, refuse } from "../outcome";
import type { Principal } from "../principal";

type Request = z.infer<typeof evaluateRequestSchema>;

const freshSeed = (): string => randomBytes(8).toString("hex");

/** The values that `value`, an evaluate request, asks for. */
export async function evaluate(principal: Principal, value: unknown): Promise<Outcome<EvaluateReply>> {
  const parsed = evaluateRequestSchema.safeParse(value);
  if (!parsed.success) return refuse("bad-request", z.prettifyError(parsed.error));
  const request = parsed.data;
  const entry = await entryAsked(principal, request);
  if (!entry.ok) return entry;
  const read = readEntryValue(entry.value);
  if (!read.ok) return refuse("unreadable-entry", "The entry document cannot be read.", read.diagnostics);
  const n = sizeAsked(request, read.value);
  if (!n.ok) return n;
  const source = sourceAsked(request);
  if (!source.ok) return source;
  const helicities = helicitiesAsked(request, read.value, n.value);
  if (!helicities.ok) return helicities;
  const many = request.helicities === "all";
  const count = pointsAsked(request) * helicities.value.length;
  if (count > mostValuesHere) return refuse("too-costly", tooMany(`${count} values`));
  const physical = request.momenta !== undefined || request.phaseSpace !== undefined;
  const numbers = request.field ?? (physical ? "complex" : "rational");
  if (physical && numbers === "prime")
    return refuse("bad-request", "Momenta have no spinors modulo a prime: the field is rational or complex.");
  const task: EvaluateTask = {
    what: "evaluate",
    entry: entry.value,
    n: n.value,
    source: source.value,
    numbers,
    helicities: helicities.value,
    many,
  };
  const computed = await compute(task);
  if (!computed.ok) return computed;
  if (computed.value.kind === "values") return answer(computed.value.reply);
  return refuse(
    "cannot-evaluate",
    "There are no values: see the diagnostics.",
    computed.value.kind === "refused" ? computed.value.diagnostics : [],
  );
}

const tooMany = (what: string): string =>
  `${what} were asked for; at most ${mostPoints} points and ${mostValuesHere} values are computed here. Ask for fewer, or use the command line.`;

async function entryAsked(principal: Principal, { form, document }: Request): Promise<Outcome<unknown>> {
  if ((form === undefined) === (document === undefined))
    return refuse("bad-request", "Give either form, an identifier such as n6k1L0-2, or document, an entry document.");
  if (form === undefined) return answer(document);
  const kept = await getEntry(principal, form);
  return kept === null ? refuse("not-found", `There is no form ${form} that you may read.`) : answer(kept);
}

function sizeAsked({ n }: Request, { amplitude }: Form): Outcome<number> {
  const { n: range } = amplitude;
  if (typeof range === "number")
    return n === undefined || n === range ? answer(range) : refuse("bad-request", `n: this form is for n = ${range}.`);
  const asked = n ?? range.from;
  if (asked < range.from || asked > (range.to ?? 64))
    return refuse("bad-request", `n: this form is for n from ${range.from} to ${range.to ?? 64}.`);
  return answer(asked);
}

const pointsAsked = ({ points, momenta, random, phaseSpace }: Request): number =>
  points?.length ?? momenta?.length ?? random ?? phaseSpace ?? 0;

function sourceAsked(request: Request): Outcome<EvaluateTask["source"]> {
  const { points, momenta, signature, random, phaseSpace, energy } = request;
  const given = [points, momenta, random, phaseSpace].filter((one) => one !== undefined).length;
  if (given !== 1) return refuse("bad-request", "Give one of points, momenta, random and phaseSpace.");
  if (pointsAsked(request) > mostPoints) return refuse("too-costly", tooMany(`${pointsAsked(request)} points`));
  if (signature !== undefined && momenta === undefined) return refuse("bad-request", "signature goes with momenta.");
  if (energy !== undefined && phaseSpace === undefined) return refuse("bad-request", "energy goes with phaseSpace.");
  if (energy !== undefined && request.field === "rational")
    return refuse("bad-request", "energy goes with field complex: exact momenta have no total energy of choice.");
  const seed = request.seed ?? freshSeed();
  if (points !== undefined) return answer({ kind: "points", document: { points } });
  if (momenta !== undefined) {
    return answer({ kind: "momenta", document: { momenta, ...(signature !== undefined && { signature }) }, seed });
  }
  if (random !== undefined) return answer({ kind: "random", count: random, seed });
  return answer({ kind: "phaseSpace", count: phaseSpace ?? 1, energy: energy ?? 1, seed });
}

function helicitiesAsked({ helicities }: Request, form: Form, n: number): Outcome<(readonly number[] | null)[]> {
  if (helicities === undefined || helicities.trim() === "") return answer([null]);
  const { k } = form.amplitude;
  if (helicities === "all") {
    if (form.component !== null)
      return refuse("bad-request", "helicities: this form is one component; leave them out.");
    const count = countHelicities(n, k);
    // Counted before they are written out: there are more than any memory holds for n = 64.
    return count > mostValuesHere ? refuse("too-costly", tooMany(`${count} helicities`)) : answer(allHelicities(n, k));
  }
  const negative = readHelicities(helicities, n);
  return negative === null
    ? refuse("bad-request", `helicities: expected ${n} signs + and -, or "all"; got ${helicities}.`)
    : answer([negative]);
}

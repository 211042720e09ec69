/** Numbers as people write them in JSON, read exactly. */
import { z } from "zod";
import { type Complex, type Rational, rational, rationals } from "../fields";

const LARGEST_NUMBER = 2_000;
const LARGEST_EXPONENT = 400;
const FRACTION = /^([+-]?[0-9]+)(?:\/([+-]?[0-9]+))?$/;
const DECIMAL = /^([+-]?)([0-9]*)(?:\.([0-9]*))?(?:[eE]([+-]?[0-9]{1,4}))?$/;

const integer = (text: string): bigint => BigInt(text.replace("+", ""));

/** "p" or "p/q". */
export const fractionSchema = z
  .string({ error: 'expected a number as text, "p" or "p/q"' })
  .max(LARGEST_NUMBER, `expected at most ${LARGEST_NUMBER} characters`)
  .regex(FRACTION, 'expected "p" or "p/q" with integers p and q')
  .refine((text) => !/\/[+-]?0+$/.test(text), "expected a denominator other than 0")
  .transform((text): Rational => {
    const [, p, q] = FRACTION.exec(text) ?? [];
    return rational(integer(p!), q === undefined ? 1n : integer(q));
  });

/** The number of a decimal, "-1.25e-3", or null where the text is none or its exponent is beyond 400 in size. */
function readDecimal(text: string): Rational | null {
  const [, sign, whole = "", fraction = "", power = "0"] = DECIMAL.exec(text) ?? [];
  const exponent = Number(power);
  if (sign === undefined || whole + fraction === "" || Math.abs(exponent) > LARGEST_EXPONENT) return null;
  const digits = BigInt(`${sign === "-" ? "-" : ""}${whole}${fraction}`);
  const shift = exponent - fraction.length;
  return shift >= 0 ? rational(digits * 10n ** BigInt(shift)) : rational(digits, 10n ** BigInt(-shift));
}

/** "p", "p/q", a decimal as text, or a JSON number, which stands for its shortest decimal. */
const realSchema = z
  .union([z.string(), z.number()], {
    error: 'expected a number: "p", "p/q", a decimal, or a pair ["re", "im"] of these',
  })
  .transform((given, context): Rational => {
    const text = String(given);
    const fraction = fractionSchema.safeParse(text);
    const value = fraction.success ? fraction.data : text.length > LARGEST_NUMBER ? null : readDecimal(text);
    if (value !== null) return value;
    const message = `expected "p", "p/q" with q other than 0, or a decimal with an exponent of at most ${LARGEST_EXPONENT}`;
    context.issues.push({ code: "custom", message, input: given });
    return z.NEVER;
  });

const pairSchema = z.tuple([realSchema, realSchema], { error: 'expected a pair ["re", "im"]' });

/** A number as in `realSchema`, or ["re", "im"]. */
export const complexNumberSchema = z.unknown().transform((value, context): Complex<Rational> => {
  const parsed = Array.isArray(value) ? pairSchema.safeParse(value) : realSchema.safeParse(value);
  if (!parsed.success) {
    for (const { path, message } of parsed.error.issues) {
      context.issues.push({ code: "custom", message, path: [...path], input: value });
    }
    return z.NEVER;
  }
  return Array.isArray(parsed.data)
    ? { re: parsed.data[0], im: parsed.data[1] }
    : { re: parsed.data as Rational, im: rationals.zero };
});

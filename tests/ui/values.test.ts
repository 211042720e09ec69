/** Values as rows, decimals and CSV; the address of the page of values says what its fields say. */
import fc from "fast-check";
import { create, all as everything } from "mathjs";
import { describe, expect, it } from "vitest";
import { addressOf, type EvaluateFields, emptyEvaluate, fieldsOfQuery } from "../../app/_ui/evaluate/evaluateFields";
import { decimalOf, valueRows, valuesAsCsv } from "../../app/_ui/evaluate/valueRows";

const math = create(everything, { number: "BigNumber", precision: 400 });

describe("decimals of fractions", () => {
  it.each([
    ["0", "0"],
    ["5/4", "1.25000000000000e+0"],
    ["-1/3", "-3.33333333333333e-1"],
    ["2/3", "6.66666666666667e-1"],
    ["9999999999999995/10", "1.00000000000000e+15"],
    ["999999999999999/1000", "9.99999999999999e+11"],
    ["1/1000", "1.00000000000000e-3"],
  ])("%s is %s", (fraction, decimal) => {
    expect(decimalOf(fraction)).toBe(decimal);
  });

  it.each(["", "x", "1/0", "1.5", "1/2/3"])("%j is no fraction", (text) => {
    expect(decimalOf(text)).toBeNull();
  });

  it("are those of mathjs with 400 digits, rounded to 15", () => {
    const whole = fc.bigInt({ min: 1n, max: 10n ** 60n });
    fc.assert(
      fc.property(whole, whole, fc.boolean(), (p, q, negative) => {
        const text = `${negative ? "-" : ""}${p}/${q}`;
        const quotient = math.divide(math.bignumber(String(p)), math.bignumber(String(q)));
        const [mantissa, exponent] = math.format(quotient, { notation: "exponential", precision: 15 }).split("e");
        expect(decimalOf(text)).toBe(`${negative ? "-" : ""}${mantissa}e${exponent}`);
      }),
    );
  });
});

describe("rows", () => {
  const reply = {
    components: [
      { helicities: "--+", values: ["1/2", null], reasons: [{ point: 1, message: 'a "denominator", vanishes' }] },
      { helicities: "+--", values: ["3", ["1e-3", "-2"] as [string, string]] },
    ],
  };

  it("come point by point, a reason where there is no value", () => {
    expect(
      valueRows(reply).map(({ point, helicities, re, im, reason }) => [point, helicities, re, im, reason]),
    ).toEqual([
      [0, "--+", "1/2", "", ""],
      [0, "+--", "3", "", ""],
      [1, "--+", "", "", 'a "denominator", vanishes'],
      [1, "+--", "1e-3", "-2", ""],
    ]);
  });

  // RFC 4180: lines end with CRLF, a quotation mark within quoted text is doubled.
  it("are CSV as RFC 4180 has it", () => {
    expect(valuesAsCsv(valueRows(reply))).toBe(
      'point,helicities,re,im,error,digits,reason\r\n0,"--+",1/2,,,,\r\n0,"+--",3,,,,\r\n1,"--+",,,,,"a ""denominator"", vanishes"\r\n1,"+--",1e-3,-2,,,\r\n',
    );
  });
});

describe("the address", () => {
  const read = (address: string): EvaluateFields =>
    fieldsOfQuery(Object.fromEntries(new URL(address, "http://localhost").searchParams));

  it.each([
    { form: "n6k1L0-2", seed: "a&b=c", helicities: "--++-+" },
    {
      notation: "<1 2>^4 / (<1 2><2 3>)",
      n: "5..",
      k: "0",
      component: "1, 2",
      where: "phaseSpace",
      count: "7",
      energy: "2.5",
    },
    { derived: "recursion", leg: "3", direction: "backward", n: "7", k: "1", loops: "1", field: "prime" },
    { notation: "1", n: "4", k: "0", where: "own", data: '{"points": [{}]}' },
  ])("of %j says the same", (changed) => {
    const fields = { ...emptyEvaluate, ...changed };
    expect(read(addressOf(fields))).toEqual(fields);
  });

  it("is the one that the API's names make", () => {
    expect(addressOf({ ...emptyEvaluate, form: "n6k1L0-2", seed: "s" })).toBe(
      "/evaluate?form=n6k1L0-2&seed=s&random=4",
    );
  });
});

import { mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { Readable } from "node:stream";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { main } from "../../../engine/cli/main";

let folder = "";
beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), "equiform-value-"));
});
afterAll(() => rmSync(folder, { recursive: true, force: true }));

const file = (name: string, content: unknown): string => {
  const path = join(folder, name);
  writeFileSync(path, typeof content === "string" ? content : JSON.stringify(content));
  return path;
};

interface Outcome {
  readonly exit: number;
  readonly out: string;
  readonly err: string;
}

async function call(words: readonly string[], input = ""): Promise<Outcome> {
  let [out, err] = ["", ""];
  const exit = await main(words, {
    stdin: Readable.from([input]),
    stdout: { write: (text: string) => (out += text) },
    stderr: { write: (text: string) => (err += text) },
  });
  return { exit, out, err };
}

async function json(words: readonly string[], input = ""): Promise<Record<string, unknown> & { exit: number }> {
  const { exit, out } = await call([...words, "--json"], input);
  return { ...(JSON.parse(out) as Record<string, unknown>), exit };
}

const entries = {
  mhv: { amplitude: { n: 5, k: 0, loops: 0 }, component: "--+++", notation: "<1 2>^4/(<1 2><2 3><3 4><4 5><5 1>)" },
  many: {
    amplitude: { n: { from: 4 }, k: 0, loops: 0 },
    component: { minus: [1, 2] },
    notation: "<1 2>^4 / prod(i : 1 <= i <= n) <i i+1>",
  },
  nmhv: { amplitude: { n: 6, k: 1, loops: 0 }, notation: "[1 2 3 4 5] + [1 2 3 5 6] + [1 3 4 5 6]" },
  vertex: {
    amplitude: { n: 5, k: 1, loops: 0 },
    notation: "[* 1 2 3 4] + [* 1 2 4 5] + [* 2 3 4 5] + [* 2 3 5 1] + [* 3 4 5 1]",
  },
  five: { amplitude: { n: 5, k: 1, loops: 0 }, notation: "[1 2 3 4 5]" },
  box: { amplitude: { n: 4, k: 0, loops: 1 }, notation: "<1 2 3 4>^2 / (<AB 1 2><AB 2 3><AB 3 4><AB 4 1>)" },
} as const;
const entry = (name: keyof typeof entries): string => file(`${name}.json`, entries[name]);

const good = [
  ["-5", "0", "0", "-5"],
  ["-5", "0", "0", "5"],
  ["5", "3", "0", "4"],
  ["5", "-3", "0", "-4"],
];

describe("value --momenta", () => {
  it("takes what points writes: the squared five-gluon component is the closed formula", async () => {
    const drawn = await call(["points", "--n", "5", "--count", "20", "--seed", "a", "--energy", "91.1876"]);
    expect(drawn.exit).toBe(0);
    const { momenta } = JSON.parse(drawn.out) as { momenta: string[][][] };
    const reply = await json(["value", entry("mhv"), "--momenta", file("drawn.json", drawn.out)]);
    expect(reply.exit).toBe(0);
    const values = reply.values as [string, string][];
    expect(values).toHaveLength(20);
    expect(reply).not.toHaveProperty("seed");
    values.forEach(([re, im], i) => {
      const p = momenta[i]!.map((leg) => leg.map(Number));
      const s = (a: number, b: number) =>
        2 * p[a]!.reduce((sum, x, c) => sum + (c === 0 ? x : -x) * (c === 0 ? p[b]![0]! : p[b]![c]!), 0);
      const closed = s(0, 1) ** 3 / (s(1, 2) * s(2, 3) * s(3, 4) * s(4, 0));
      expect((Number(re) ** 2 + Number(im) ** 2) / closed).toBeCloseTo(1, 12);
      expect((reply.digits as number[])[i]).toBeGreaterThan(11);
      expect(Number((reply.errors as string[])[i])).toBeLessThan(1e-12 * Math.sqrt(Math.abs(closed)));
    });
  });

  it("is exact for rational momenta, |A|^2 = s^2/t^2 of four gluons up to the scale of the spinors", async () => {
    const path = file("pythagoras.json", { momenta: [good] });
    const reply = await json(["value", entry("many"), "--momenta", path, "--field", "rational", "--n", "4"]);
    expect(reply.exit).toBe(0);
    // lambda_1 = (1,0), lambda_2 = (0,1), lambda_3 = (1,1/3), lambda_4 = (1,-3): <12>^3/(<23><34><41>) = 1/((-1)(-10/3)(3)) = 1/10.
    expect(reply.values).toEqual([["1/10", "0"]]);
    // The spinors of doubles are longer by sqrt(E+z), E-z for leg 2 (sqrt(10), sqrt(10), 3, 1), to the powers 2, 2, -2, -2.
    const doubles = await json(["value", entry("many"), "--momenta", path, "--n", "4"]);
    const [[re, im]] = doubles.values as [[string, string]];
    expect(Number(re)).toBeCloseTo(((1 / 10) * (10 * 10)) / 9, 12);
    expect(Number(im)).toBeCloseTo(0, 12);
    // How many are claimed depends on the frames that are drawn; a double has not quite 16.
    expect(doubles.digits).toHaveLength(1);
    expect((doubles.digits as number[])[0]).toBeGreaterThanOrEqual(14);
    expect((doubles.digits as number[])[0]).toBeLessThanOrEqual(15);
  });

  it("is a rational number at rational points of signature (2,2), and the double's up to the scale of the spinors", async () => {
    const drawn = await call(["points", "--n", "6", "--seed", "b", "--field", "rational"]);
    const path = file("rational.json", drawn.out);
    const helicities = "--helicities=-+-+-+";
    const exact = await json(["value", entry("nmhv"), "--momenta", path, "--field", "rational", helicities]);
    expect(exact.helicities).toBe("-+-+-+");
    const [value] = exact.values as [string];
    expect(value).toMatch(/^-?\d+\/\d+$/);
    const doubles = await json(["value", entry("nmhv"), "--momenta", path, helicities]);
    const [[re, im]] = doubles.values as [[string, string]];
    expect(im).toBe("0");
    // Exact spinors are (1, p21/p11) and (p11, p12), those of doubles have equal lengths: t^2 = |lambdatilde|/|lambda| for each leg.
    const decimal = (text: string): number => Number(text.split("/")[0]) / Number(text.split("/")[1] ?? 1);
    const { momenta } = JSON.parse(drawn.out) as { momenta: string[][][] };
    const scale = momenta[0]!.reduce((product, leg, a) => {
      const [E, x, y, z] = leg.map(decimal) as [number, number, number, number];
      const ratio = Math.hypot(E + z, x - y) / Math.hypot(1, (x + y) / (E + z));
      return a % 2 === 0 ? product * ratio : product / ratio;
    }, 1);
    expect(Number(re) / (decimal(value) * scale)).toBeCloseTo(1, 9);
  });

  it("warns of soft and collinear legs and of input with few digits, and still gives the value", async () => {
    const tilt = 1e-6;
    const momenta = [
      ["-5", "0", "0", "-5"],
      ["-5", "0", "0", "5"],
      [5, 5 * Math.sin(tilt), 0, -5 * Math.cos(tilt)],
      [5, -5 * Math.sin(tilt), 0, 5 * Math.cos(tilt)],
    ];
    const path = file("collinear.json", {
      momenta: [momenta, good.map((p, a) => (a === 2 ? ["5.000000002", "3", "0", "4"] : p))],
    });
    const reply = await json(["value", entry("many"), "--n", "4", "--momenta", path]);
    expect(reply.exit).toBe(0);
    expect(reply.values).not.toContain(null);
    expect(
      (reply.warnings as { point: number; message: string }[]).map(({ point, message }) => `${point}: ${message}`),
    ).toEqual([
      expect.stringMatching(/^0: legs 2 and 3 are nearly collinear, s\(2 3\) = 5\.0e-13 .*: digits are lost$/),
      expect.stringMatching(/^0: legs 4 and 1 are nearly collinear/),
      expect.stringMatching(/^1: the momenta are massless and conserved only to 4\.\de-10, and values are no better$/),
    ]);
    const digits = reply.digits as number[];
    expect(digits[0]).toBeLessThan(12);
    expect(digits[1]).toBe(9);
    const text = await call(["value", entry("many"), "--n", "4", "--momenta", path]);
    expect(text.out.trim().split("\n")).toHaveLength(2);
    expect(text.out).toMatch(/\(error \S+, 9 digits\)/);
    expect(text.err).toContain("point 0: legs 2 and 3 are nearly collinear");
  });

  it("says which legs are collinear where there is no value", async () => {
    const forward = [good[0], good[1], ["5", "0", "0", "-5"], ["5", "0", "0", "5"]];
    const path = file("forward.json", { momenta: [forward, good] });
    const reply = await json(["value", entry("many"), "--n", "4", "--momenta", path, "--field", "rational"]);
    expect(reply.values).toEqual([null, ["1/10", "0"]]);
    expect(reply.reasons).toEqual([
      { point: 0, message: "a denominator vanishes at characters 10 to 39 of the notation" },
    ]);
    const components = file("mhv4.json", { amplitude: { n: 4, k: 0, loops: 0 }, notation: "1" });
    const component = await json(["value", components, "--momenta", path, "--helicities=--++"]);
    expect(component.reasons).toEqual([
      { point: 0, message: "<2 3> vanishes: legs 2 and 3 are collinear, and the amplitude is singular" },
    ]);
    const text = await call(["value", components, "--momenta", path, "--helicities=--++"]);
    expect(text.out).toMatch(/^no value: <2 3> vanishes/);
  });

  it("draws the references that momenta do not fix, and the component does not depend on them", async () => {
    const path = file(
      "fiveMomenta.json",
      (await call(["points", "--n", "5", "--seed", "c", "--field", "rational"])).out,
    );
    const words = ["--momenta", path, "--field", "rational", "--helicities=-+-+-"];
    const [one, two] = [
      await json(["value", entry("vertex"), ...words, "--seed", "1"]),
      await json(["value", entry("vertex"), ...words]),
    ];
    expect(one.seed).toBe("1");
    expect(two.seed).toMatch(/^[0-9a-f]{64}$/);
    expect(one.values).toEqual(two.values);
    expect(one.values).toEqual((await json(["value", entry("five"), ...words])).values);
  });

  it.each<[string, keyof typeof entries, readonly string[], unknown, string, string]>([
    ["three legs", "mhv", [], { momenta: [good.slice(1)] }, "momenta-count", "has 5, and an amplitude has at least 4"],
    [
      "a massive leg",
      "many",
      ["--n", "4"],
      { momenta: [[...good.slice(0, 3), ["5.5", "-3", "0", "-4"]]] },
      "momenta-mass",
      "leg 4 is not massless: p^2 = 5.25",
    ],
    [
      "incoming signs",
      "many",
      ["--n", "4"],
      { momenta: [good.map((p, a) => (a < 2 ? ["5", "0", "0", a === 0 ? "5" : "-5"] : p))] },
      "momenta-conservation",
      "their sum is (20, 0, 0, 0)",
    ],
    ["a zero leg", "mhv", [], { momenta: [[...good, ["0", "0", "0", "0"]]] }, "momenta-zero", "leg 5"],
    [
      "a huge leg",
      "many",
      ["--n", "4"],
      { momenta: [good.map((p) => p.map((x) => `${x}e200`))] },
      "momenta-range",
      "10^120",
    ],
    ["no list", "mhv", [], { momenta: 7 }, "momenta-shape", "expected a list of points"],
    ["no JSON", "mhv", [], "{", "momenta-json", "is not JSON"],
    ["a loop", "box", [], { momenta: [good] }, "momenta-loops", "loop lines"],
    ["no helicities", "five", [], { momenta: [[...good, good[0]]] }, "momenta-helicities", "superamplitude"],
    [
      "wrong helicities",
      "five",
      ["--helicities=--+++"],
      { momenta: [] },
      "helicities-count",
      "2 minus signs; for k = 1 there are 3",
    ],
    ["another component", "mhv", ["--helicities=+--++"], { momenta: [] }, "helicities-component", "--+++"],
  ])("%s: exit 2 and a diagnostic that says what to do", async (name, form, words, document, code, message) => {
    const path = file(`bad ${name}.json`, document);
    const reply = await json(["value", entry(form), "--momenta", path, ...words]);
    expect(reply.exit).toBe(2);
    const diagnostics = reply.diagnostics as { code: string; message: string; help?: string }[];
    const found = diagnostics.find((d) => d.code === code);
    expect(found?.message, JSON.stringify(diagnostics)).toContain(message);
    expect(found?.help?.length).toBeGreaterThan(10);
  });

  it.each([
    [["--field", "prime"], "--momenta goes with --field complex or rational"],
    [["--field", "real"], "--field: expected rational, prime, complex, got real"],
    [["--random", "3"], "give one of --points FILE, --momenta FILE and --random N"],
    [["--helicities=--+"], "--helicities: expected 5 signs + and -, got --+"],
    [["--helicities=--+++", "--all-helicities"], "give either --helicities or --all-helicities"],
    [["--all-helicities"], "--all-helicities: this form is one component"],
  ])("bad usage %j: exit 2", async (words, message) => {
    const { exit, err } = await call([
      "value",
      entry("mhv"),
      "--momenta",
      file("good.json", { momenta: [] }),
      ...words,
    ]);
    expect(exit).toBe(2);
    expect(err).toContain(message);
  });
});

describe("value --helicities", () => {
  it("reads no chi, and goes with every field: the residue is the rational value's", async () => {
    const words = ["value", entry("nmhv"), "--random", "3", "--seed", "d"];
    const pattern = "--helicities=--+-++";
    const exact = await json([...words, pattern]);
    const doubles = await json([...words, pattern, "--field", "complex"]);
    const p = 2n ** 61n - 1n;
    const twistors = [1, 2, 3, 4, 5, 6].map((a) => [1, a, a * a, a * a * a].map(String));
    const points = file("moment.json", { points: [{ twistors }] });
    const [rational, prime] = [
      await json(["value", entry("nmhv"), "--points", points, pattern]),
      await json(["value", entry("nmhv"), "--points", points, pattern, "--field", "prime"]),
    ];
    const [[value], [residue]] = [rational.values, prime.values] as [[string], [string]];
    const [above, below = "1"] = value.split("/");
    expect((BigInt(residue) * BigInt(below) - BigInt(above!)) % p).toBe(0n);
    (exact.values as string[]).forEach((text, i) => {
      const [numerator, denominator = "1"] = text.split("/");
      const [re] = (doubles.values as [string, string][])[i]!;
      expect(Number(re) / (Number(numerator) / Number(denominator))).toBeCloseTo(1, 8);
    });
  });

  it("--all-helicities gives every component under its name", async () => {
    const words = ["value", entry("five"), "--random", "2", "--seed", "e"];
    const all = (await json([...words, "--all-helicities"])).components as { helicities: string; values: string[] }[];
    expect(all).toHaveLength(10);
    for (const { helicities, values } of all.slice(0, 3)) {
      expect((await json([...words, `--helicities=${helicities}`])).values).toEqual(values);
    }
    const text = await call([...words, "--all-helicities"]);
    expect(text.out.split("\n")[0]).toBe("point 0");
    expect(text.out).toContain(`  ${all[0]!.helicities}  ${all[0]!.values[0]}`);
    const large = file("large.json", { amplitude: { n: 40, k: 18, loops: 0 }, notation: "0 [1 2 3 4 5]" });
    const refused = await call(["value", large, "--random", "1", "--all-helicities"]);
    expect([refused.exit, refused.err]).toEqual([2, expect.stringContaining("at most 100000 values")]);
    const many = await json(["value", entry("nmhv"), "--random", "10000", "--all-helicities", "--seed", "f"]);
    expect(many.exit).toBe(2);
    expect((many.diagnostics as { code: string }[])[0]?.code).toBe("values-many");
  });

  it("complex points are pairs, and loop forms take their lines from the points", async () => {
    const twistors = [
      [["1", "1"], "0", "0", "1"],
      ["0", ["1", "-1"], "2", "0"],
      ["1", "2", ["0", "3"], "1"],
      ["2", "-1", "1", ["1/2", "1"]],
    ];
    const lines = [
      [
        ["1", "2", "3", "5"],
        ["2", "0.5", ["1", "1"], "1"],
      ],
    ];
    const points = file("complexPoints.json", { points: [{ twistors, lines }] });
    const reply = await json(["value", entry("box"), "--points", points, "--field", "complex"]);
    expect(reply.exit).toBe(0);
    expect((reply.digits as number[])[0]).toBeGreaterThan(10);
    const refused = await json(["value", entry("box"), "--points", points]);
    expect(refused.exit).toBe(2);
  });
});

describe("points", () => {
  it("as CSV has a line for each leg, and the numbers of the JSON", async () => {
    const words = ["points", "--n", "4", "--count", "3", "--seed", "g"];
    const [csv, document] = [await call([...words, "--to", "csv"]), await json(words)];
    const lines = csv.out.trim().split("\n");
    expect(lines[0]).toBe("point,leg,E,x,y,z");
    const rows = (document.momenta as string[][][]).flatMap((legs, i) => legs.map((p, a) => [i, a + 1, ...p].join()));
    expect(lines.slice(1)).toEqual(rows);
    expect(document).toMatchObject({ signature: "1,3", energy: 1, seed: "g" });
    // Two massless bodies: pi/2.
    expect(document.weight).toBeCloseTo(Math.PI / 2, 14);
  });

  it("prints a seed that it drew", async () => {
    const [one, two] = [await json(["points", "--n", "5"]), await json(["points", "--n", "5"])];
    expect(one.seed).toMatch(/^[0-9a-f]{64}$/);
    expect(one.seed).not.toBe(two.seed);
    expect((await json(["points", "--n", "5", "--seed", String(one.seed)])).momenta).toEqual(one.momenta);
    expect((await call(["points", "--n", "5", "--to", "csv"])).err).toMatch(/^seed [0-9a-f]{64}\n$/);
  });

  it.each([
    [[], "give --n"],
    [["--n", "3"], "--n: expected 4 to 64"],
    [["--n", "5", "--count", "0"], "--count: expected 1 to 100000"],
    [["--n", "5", "--to", "xml"], "--to: expected json or csv"],
    [["--n", "5", "--energy", "-1"], "--energy: expected a number"],
    [["--n", "5", "--energy", "1e9"], "--energy: expected a number"],
    [["--n", "5", "--energy", "1", "--field", "rational"], "--energy goes with --field complex"],
    [["--n", "5", "--field", "prime"], "--field: expected complex or rational"],
    [["--n", "5", "--to", "csv", "--json"], "exclude each other"],
  ])("%j is bad usage: exit 2", async (words, message) => {
    const { exit, err } = await call(["points", ...words]);
    expect(exit).toBe(2);
    expect(err).toContain(message);
  });
});

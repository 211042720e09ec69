/** `points`: physical points for `value --momenta` and for a user's own tests. */
import { phaseSpaceVolume, randomness, rationalMomenta, rationals, realDoubles, scatteringPoint } from "../index";
import { type Call, type Command, type Exit, integerOption, Usage } from "./command";
import { printJson } from "./print";
import { freshSeed } from "./seed";

const mostPoints = 100_000;
const mostLegs = 64;
const formats = ["json", "csv"];

export const points: Command = {
  name: "points",
  positional: "",
  fewestPositional: 0,
  mostPositional: 0,
  summary:
    "Draws momenta of massless particles: two incoming ones along z, the others flat in phase space; or exact ones.",
  options: [
    { name: "n", value: "N", help: `number of legs, 4 to ${mostLegs}; 1 and 2 are incoming, all momenta are outgoing` },
    { name: "count", value: "M", help: `number of points, 1 to ${mostPoints} (default 1)` },
    { name: "seed", value: "S", help: "seed; drawn and printed where it is left out" },
    { name: "energy", value: "W", help: "total energy in the centre of mass, any unit (default 1)" },
    {
      name: "field",
      value: "FIELD",
      help: "complex (the default): real momenta in double precision; rational: exact ones in signature (2,2)",
    },
    { name: "to", value: "FORMAT", help: "json (the default, read by value --momenta) or csv" },
  ],
  run,
};

/** One point: the legs' (E, x, y, z) as text. */
type Written = readonly (readonly string[])[];

async function run(call: Call): Promise<Exit> {
  const n = integerOption(call, "n", 4, mostLegs);
  if (n === null) throw new Usage("give --n, the number of legs");
  const count = integerOption(call, "count", 1, mostPoints) ?? 1;
  const format = call.option("to") ?? "json";
  if (!formats.includes(format)) throw new Usage(`--to: expected json or csv, got ${format}`);
  if (call.json && format !== "json") throw new Usage("--json and --to csv exclude each other");
  const kind = call.option("field") ?? "complex";
  if (kind !== "complex" && kind !== "rational") throw new Usage(`--field: expected complex or rational, got ${kind}`);
  if (kind === "rational" && call.has("energy")) throw new Usage("--energy goes with --field complex");
  const energy = energyAsked(call);
  const seed = call.option("seed") ?? freshSeed();
  const random = randomness(seed);
  const draw = (): Written =>
    kind === "rational"
      ? rationalMomenta(n, random).map((p) => p.map(rationals.toText))
      : scatteringPoint(n, energy, random).map((p) => p.map(realDoubles.toText));
  const drawn = Array.from({ length: count }, draw);
  const physical = kind === "complex";
  if (format === "csv") {
    call.io.stdout.write(csv(drawn));
    if (call.option("seed") === null) call.io.stderr.write(`seed ${seed}\n`);
  } else {
    printJson(call, {
      momenta: drawn,
      signature: physical ? "1,3" : "2,2",
      // Of every point: the volume of the phase space of legs 3 to n, without powers of 2 pi.
      ...(physical ? { energy, weight: phaseSpaceVolume(n - 2, energy) } : {}),
      seed,
    });
  }
  return 0;
}

/** Further energies would leave the range of doubles in p^2 or in the volume. */
const [smallestEnergy, largestEnergy] = [1e-6, 1e6];

function energyAsked(call: Call): number {
  const text = call.option("energy");
  if (text === null) return 1;
  const energy = /^[0-9.]+([eE][+-]?[0-9]+)?$/.test(text) ? Number(text) : Number.NaN;
  if (!(energy >= smallestEnergy && energy <= largestEnergy))
    throw new Usage(`--energy: expected a number from ${smallestEnergy} to ${largestEnergy}, got ${text}`);
  return energy;
}

/** A line for each leg of each point, both counted as in `value`: points from 0, legs from 1. */
function csv(drawn: readonly Written[]): string {
  const lines = drawn.flatMap((legs, point) => legs.map((p, a) => [point, a + 1, ...p].join(",")));
  return ["point,leg,E,x,y,z", ...lines].map((line) => `${line}\n`).join("");
}

/** The outside evaluators of the bench: the C tape interpreter beside this file, and PARI/GP. Null where they are not installed. */
import { spawnSync } from "node:child_process";
import { mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import type { Point } from "../../kinematics/point";
import { readInput } from "../inputs";
import { MERSENNE_31 } from "../kernelFields";
import type { Tape } from "../tape";

const works = (command: string, argument: string): boolean =>
  spawnSync(command, [argument], { stdio: "ignore" }).status === 0;

export interface Baseline {
  /** Points a second of processor time. */
  readonly rate: number;
  /** The value at the point. */
  readonly sum: number;
}

/** The C interpreter, compiled for the time of the bench; null without a C compiler. */
export class CTape {
  private constructor(
    private readonly folder: string,
    private readonly program: string,
  ) {}

  /** @param source the path of tape.c */
  static build(source: string): CTape | null {
    if (!works("cc", "--version")) return null;
    const folder = mkdtempSync(join(tmpdir(), "bench-"));
    const program = join(folder, "tape");
    const flags = process.arch === "x64" ? ["-msse4.1"] : [];
    const done = spawnSync("cc", ["-O3", ...flags, "-o", program, source], { encoding: "utf8" });
    if (done.status !== 0) throw new Error(`tape.c does not compile:\n${done.stderr}`);
    return new CTape(folder, program);
  }

  /** Runs a tape modulo 2^31-1 with `vectors` vectors of copies of one point. */
  run(tape: Tape, point: Point<number>, vectors: number, milliseconds: number): Baseline {
    const given = Math.max(
      ...tape.inputs.map(({ slot, width }) => slot + width),
      ...tape.constants.map(({ slot }) => slot + 1),
    );
    const lanes = 4 * vectors;
    const head = 5;
    const words = new Int32Array(head + given * lanes + tape.code.length);
    words.set([vectors, tape.slots, given, tape.code.length, milliseconds]);
    for (const input of tape.inputs) {
      readInput(input, point, 0, 1)
        .flat()
        .forEach((x, i) => {
          words.fill(x, head + (input.slot + i) * lanes, head + (input.slot + i + 1) * lanes);
        });
    }
    for (const { slot, numerator, denominator } of tape.constants) {
      if (denominator !== 1n) throw new Error("run: expected a tape with integer constants");
      words.fill(Number(numerator % BigInt(MERSENNE_31)), head + slot * lanes, head + (slot + 1) * lanes);
    }
    words.set(tape.code, head + given * lanes);
    const done = spawnSync(this.program, { input: Buffer.from(words.buffer), encoding: "utf8" });
    if (done.status !== 0) throw new Error(`the C tape ended with ${done.status}: ${done.stderr}`);
    const [rate, sum] = done.stdout.trim().split(" ").map(Number) as [number, number];
    return { rate, sum };
  }

  dispose(): void {
    rmSync(this.folder, { recursive: true, force: true });
  }
}

/** The NMHV sum at one point modulo 2^31-1 in PARI/GP, brackets by matdet; null without gp. */
export function pariNmhv(n: number, point: Point<number>, repetitions: number): Baseline | null {
  if (!works("gp", "--version")) return null;
  const matrix = (rows: readonly (readonly number[])[]) => `[${rows.map((row) => row.join(",")).join(";")}]`;
  const program = [
    `Z=${matrix(point.twistors)}*Mod(1,${MERSENNE_31});`,
    `C=${matrix(point.chi.map((flavours) => flavours.map((row) => row[0]!)))}*Mod(1,${MERSENNE_31});`,
    "b(a,c,d,e)=matdet(matrix(4,4,i,j,Z[[a,c,d,e][i],j]));",
    "five(v)={my(c=[b(v[2],v[3],v[4],v[5]),b(v[3],v[4],v[5],v[1]),b(v[4],v[5],v[1],v[2]),b(v[5],v[1],v[2],v[3]),b(v[1],v[2],v[3],v[4])]);prod(A=1,4,sum(i=1,5,c[i]*C[v[i],A]))/vecprod(c)};",
    `w()=sum(i=2,${n - 3},sum(j=i+2,${n - 1},five([1,i,i+1,j,j+1])));`,
    `gettime();for(r=1,${repetitions},w());t=gettime();print(t," ",lift(w()));`,
  ].join("\n");
  const done = spawnSync("gp", ["-q", "-f"], { input: `${program}\n`, encoding: "utf8" });
  const [milliseconds, sum] = done.stdout.trim().split(" ").map(Number) as [number, number];
  return { rate: (1000 * repetitions) / milliseconds, sum };
}

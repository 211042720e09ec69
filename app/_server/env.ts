/** The environment, parsed once; a value that cannot be used ends the program with one clear line for each. */
import { availableParallelism } from "node:os";
import { join, resolve } from "node:path";
import { z } from "zod";

const whole = (least: number, most: number) =>
  z
    .string()
    .regex(/^\d{1,9}$/, "a whole number is expected")
    .transform(Number)
    .pipe(z.int().min(least).max(most));

/** Every variable the program reads, with its default; README lists the same. */
export const environmentSchema = z.object({
  /** Port the server listens on, on the loopback address. */
  PORT: whole(1, 65535).default(3000),
  /** `postgresql://...`; absent: SQLite in EQUIFORM_DATA. */
  EQUIFORM_DATABASE_URL: z
    .string()
    .regex(/^(postgres(ql)?:\/\/|file:).+/, "postgresql://... or file:PATH is expected")
    .optional(),
  /** Folder of the embedded database. */
  EQUIFORM_DATA: z.string().min(1).default("./data"),
  /** Address that citations print; absent: http://localhost:PORT. */
  EQUIFORM_BASE_URL: z.url({ protocol: /^https?$/ }).optional(),
  /** Checks that run at once; default one less than the processors, at least one. */
  EQUIFORM_WORKERS: whole(0, 256).default(Math.max(1, availableParallelism() - 1)),
  /** Seconds after which the job of a silent worker is taken up again. */
  EQUIFORM_LEASE_SECONDS: whole(1, 3600).default(20),
  /** Minutes after which a check is stopped and stays undecided. */
  EQUIFORM_CHECK_MINUTES: whole(1, 1440).default(60),
  /** Megabytes of memory that one check may use. */
  EQUIFORM_CHECK_MEMORY: whole(64, 65536).default(2048),
  /** Folder of entry documents that are submitted on the first start. */
  EQUIFORM_SEED: z.string().default("./seed-data"),
});

export interface Environment {
  readonly port: number;
  readonly databaseUrl: string;
  readonly baseUrl: string;
  readonly workers: number;
  readonly leaseMilliseconds: number;
  readonly checkMilliseconds: number;
  readonly checkMemory: number;
  readonly seedFolder: string;
}

/** Parses `variables`; an empty value counts as absent. Throws an Error that names every variable that cannot be used. */
export function parseEnvironment(variables: Record<string, string | undefined>): Environment {
  const given = Object.fromEntries(Object.entries(variables).filter(([, value]) => value !== ""));
  const parsed = environmentSchema.safeParse(given);
  if (!parsed.success) {
    const lines = parsed.error.issues.map((issue) => `${issue.path.join(".")}: ${issue.message}`);
    throw new Error(`The environment cannot be used. ${lines.join("; ")}`);
  }
  const e = parsed.data;
  return {
    port: e.PORT,
    databaseUrl: e.EQUIFORM_DATABASE_URL ?? `file:${join(resolve(e.EQUIFORM_DATA), "equiform.db")}`,
    baseUrl: (e.EQUIFORM_BASE_URL ?? `http://localhost:${e.PORT}`).replace(/\/+$/, ""),
    workers: e.EQUIFORM_WORKERS,
    leaseMilliseconds: e.EQUIFORM_LEASE_SECONDS * 1000,
    checkMilliseconds: e.EQUIFORM_CHECK_MINUTES * 60_000,
    checkMemory: e.EQUIFORM_CHECK_MEMORY,
    seedFolder: resolve(e.EQUIFORM_SEED),
  };
}

let parsed: Environment | undefined;

/** This process's environment. */
export function environment(): Environment {
  parsed ??= parseEnvironment(process.env);
  return parsed;
}

/** The same for a program's first line: where it cannot be used, says so in one line and ends the process. */
export function environmentOrExit(): Environment {
  try {
    return environment();
  } catch (error) {
    console.error(`equiform: ${(error as Error).message}`);
    return process.exit(2);
  }
}

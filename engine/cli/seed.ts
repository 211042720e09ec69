/** Seeds of checks made on the command line: drawn by the system's generator after the form was read. */
import { randomBytes } from "node:crypto";

export const freshSeed = (): string => randomBytes(32).toString("hex");

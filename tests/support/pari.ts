/** PARI/GP (Debian's pari-gp) as an outside calculator. */
import { execFileSync } from "node:child_process";

/** What `gp` prints for a program, without the last newline. The test set-up installs it; a missing one fails the test. */
export function pari(program: string): string {
  return execFileSync("gp", ["-q", "-f"], {
    input: `${program}\n`,
    encoding: "utf8",
    maxBuffer: 64 * 1024 * 1024,
  }).trimEnd();
}

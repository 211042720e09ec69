/** Reading and writing of files for the commands. */
import { readFile, stat, writeFile } from "node:fs/promises";
import { type Diagnostic, failure, type Result, success } from "../index";
import type { Io } from "./command";

/** Larger files are refused before they are read. */
const mostBytes = 64 * 1024 * 1024;

/** The text of a file, `-` for standard input. What is not UTF-8 keeps its replacement characters: the readers name them. */
export async function readText(name: string, io: Io): Promise<Result<string>> {
  if (name === "-") {
    const parts: Buffer[] = [];
    let size = 0;
    for await (const part of io.stdin) {
      const bytes = Buffer.isBuffer(part) ? part : Buffer.from(part);
      size += bytes.length;
      if (size > mostBytes) return failure(tooLarge(name));
      parts.push(bytes);
    }
    return success(Buffer.concat(parts).toString("utf8"));
  }
  try {
    const about = await stat(name);
    if (about.isDirectory()) return failure(fileFault(name, "it is a folder"));
    if (about.size > mostBytes) return failure(tooLarge(name));
    return success(await readFile(name, "utf8"));
  } catch (error) {
    return failure(fileFault(name, reasonOf(error)));
  }
}

export async function writeText(name: string, text: string): Promise<Result<null>> {
  try {
    await writeFile(name, text);
    return success(null);
  } catch (error) {
    return failure(fileFault(name, reasonOf(error)));
  }
}

const tooLarge = (name: string): Diagnostic => fileFault(name, `it is larger than ${mostBytes / 1024 / 1024} MiB`);

export const fileFault = (name: string, reason: string): Diagnostic => ({
  code: "file",
  message: `${name}: ${reason}.`,
  help: "Give the name of a file, or - for standard input.",
});

function reasonOf(error: unknown): string {
  const code = (error as { code?: unknown }).code;
  if (code === "ENOENT") return "there is no such file";
  if (code === "EACCES" || code === "EPERM") return "it may not be opened";
  if (code === "ENOTDIR") return "a part of its path is no folder";
  return typeof code === "string" ? `the system says ${code}` : "it cannot be opened";
}

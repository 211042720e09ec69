/** A PostgreSQL server of the tests' own: private folder, private socket, no network port, gone after the tests. */
import { spawnSync } from "node:child_process";
import { chmodSync, existsSync, mkdirSync, mkdtempSync, readdirSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";

/** Folder of the server's programs, newest version first; null where it is not installed. */
export function findPostgresql(): string | null {
  const base = "/usr/lib/postgresql";
  const versions = existsSync(base) ? readdirSync(base).sort((a, b) => Number(b) - Number(a)) : [];
  for (const version of versions) {
    const folder = join(base, version, "bin");
    if (existsSync(join(folder, "initdb")) && existsSync(join(folder, "pg_ctl"))) return folder;
  }
  return null;
}

export interface Server {
  /** Makes an empty database and returns its address. */
  readonly makeDatabase: (name: string) => string;
  readonly stop: () => void;
}

/** The server refuses to run as root; there it runs as the user that the package made. */
function run(program: string, args: readonly string[]): void {
  const root = process.getuid?.() === 0;
  const done = root
    ? spawnSync("runuser", ["-u", "postgres", "--", program, ...args], { encoding: "utf8", cwd: "/" })
    : spawnSync(program, args, { encoding: "utf8" });
  if (done.status !== 0) throw new Error(`${program} failed: ${done.stderr || done.error?.message}`);
}

export function startPostgresql(programs: string): Server {
  const folder = mkdtempSync(join(tmpdir(), "equiform-postgresql-"));
  const data = join(folder, "data");
  const socket = join(folder, "socket");
  mkdirSync(socket);
  for (const path of [folder, socket]) chmodSync(path, 0o777);
  run(join(programs, "initdb"), ["-D", data, "-U", "postgres", "-A", "trust", "-E", "UTF8", "--no-sync"]);
  const settings = `-c listen_addresses='' -c unix_socket_directories='${socket}' -c fsync=off`;
  run(join(programs, "pg_ctl"), ["-D", data, "-w", "-l", join(folder, "log"), "-o", settings, "start"]);
  return {
    makeDatabase: (name) => {
      run(join(programs, "createdb"), ["-h", socket, "-U", "postgres", name]);
      return `postgresql://postgres@localhost/${name}?host=${encodeURIComponent(socket)}`;
    },
    stop: () => {
      run(join(programs, "pg_ctl"), ["-D", data, "-m", "immediate", "-w", "stop"]);
      rmSync(folder, { recursive: true, force: true });
    },
  };
}

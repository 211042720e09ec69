/**
 * The dispatcher of the `equiform` command: the engine's commands, loaded when one is asked for.
 *
 * The exit status is set, not forced, so that long output still in the pipe is written to its end.
 */
const broken = (error: Error & { code?: string }): void => {
  // The reader closed the pipe (`| head`): nothing left to say to anybody.
  if (error.code === "EPIPE") process.exit(process.exitCode ?? 0);
  throw error;
};
process.stdout.on("error", broken);
process.stderr.on("error", broken);

const { main } = await import("../../../engine/cli/main");
process.exitCode = await main(process.argv.slice(2), {
  stdin: process.stdin,
  stdout: process.stdout,
  stderr: process.stderr,
});

export {};

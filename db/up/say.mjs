/** A reason to stop that the person can act on: printed as it is, without a stack. */
export class Stop extends Error {}

/** One line of progress on the terminal. */
export function say(line) {
  process.stdout.write(`${line}\n`);
}

/** Runs a command of this folder and turns a `Stop` into its plain sentence and exit code 1. */
export async function run(main) {
  try {
    await main();
  } catch (error) {
    process.stderr.write(
      `\n${error instanceof Stop ? error.message : error instanceof Error ? error.stack : String(error)}\n`,
    );
    process.exitCode = 1;
  }
}

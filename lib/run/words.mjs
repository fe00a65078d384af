/** A failure that is told in a sentence, without a stack. */
export class Problem extends Error {}

const startedAtMs = Date.now();

// A terminal that has gone away must not take the supervisor with it before it has ended its processes.
for (const stream of [process.stdout, process.stderr]) stream.on("error", () => {});

/**
 * Writes one line of progress, with the seconds since the start.
 * @param {string} sentence
 */
export function say(sentence) {
  const seconds = ((Date.now() - startedAtMs) / 1000).toFixed(1).padStart(6);
  process.stdout.write(`${seconds} s  ${sentence}\n`);
}

/**
 * Writes one line of progress to the error stream, for tools whose output is read by a shell.
 * @param {string} sentence
 */
export function sayAside(sentence) {
  process.stderr.write(`${sentence}\n`);
}

/**
 * Tells a failure: a Problem as its sentence, anything else with its stack, for that is a fault of ours.
 * @param {unknown} error
 */
export function tellFailure(error) {
  if (error instanceof Problem) process.stderr.write(`\n${error.message}\n`);
  else
    process.stderr.write(`\nAn unexpected fault:\n${error instanceof Error ? error.stack : String(error)}\n`);
}

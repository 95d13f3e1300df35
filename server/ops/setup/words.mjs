/** What the set-up says to the person at the terminal, and how it fails: in one sentence that says what to do. */

/** A failure of the set-up that the person can mend; its message is shown alone, without a stack. */
export class SetupError extends Error {
  name = 'SetupError'
}

/** Writes one line of progress on standard error, so that standard output stays free for answers. */
export function say(line) {
  process.stderr.write(`${line}\n`)
}

/** Shows the failure and gives the exit code that the process should end with (1). */
export function explain(error) {
  if (error instanceof SetupError) say(`\nBaywright: ${error.message}`)
  else if (error?.code === 'ENOSPC') say('\nBaywright: the disk is full; free some space and run the command again.')
  else say(`\nBaywright: unexpected failure of the set-up.\n${error?.stack ?? error}`)
  return 1
}

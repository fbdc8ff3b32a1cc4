/** Where progress goes; the tests pass a quieter one. */
export type Report = (line: string) => void

/** Prints one line with the seconds since the process began, so that a slow step shows itself. */
export const report: Report = (line) => {
  const seconds = ((Date.now() - performance.timeOrigin) / 1000).toFixed(1)
  process.stdout.write(`${seconds.padStart(6)} s  ${line}\n`)
}

/** A failure that the reader can act on: printed without a stack trace. */
export class SetupError extends Error {
  override name = "SetupError"
}

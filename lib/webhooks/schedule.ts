/** Seconds from each failed attempt to the next. @source PLATFORM 6.2 */
const pauses_s = [5, 5 * 60, 30 * 60, 2 * 3600, 5 * 3600, 10 * 3600, 14 * 3600, 20 * 3600, 24 * 3600]

/** Share of the pause that chance adds, so that the failures of one moment do not come back as one. */
const jitter = 0.1

/** Attempts that a delivery has at most: the first and one after each pause. */
export const MOST_ATTEMPTS = pauses_s.length + 1

/** When to try again after `attempts` failures; undefined when that was the last. `chance` is from 0 to 1. */
export function nextAttemptAfter(attempts: number, now: Date, chance: number): Date | undefined {
  const pause_s = pauses_s[attempts - 1]
  if (pause_s === undefined) return undefined
  return new Date(now.getTime() + pause_s * 1000 * (1 + jitter * chance))
}

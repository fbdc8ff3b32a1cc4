import { describe, expect, it } from "vitest"
import { MOST_ATTEMPTS, nextAttemptAfter } from "@/lib/webhooks/schedule"

describe("the schedule of attempts", () => {
  // PLATFORM 6.2: retries after 5 s, 5 m, 30 m, 2 h, 5 h, 10 h, 14 h, 20 h, 24 h.
  const minutes = [5 / 60, 5, 30, 120, 300, 600, 840, 1200, 1440]
  const now = new Date("2026-12-01T09:00:00Z")

  it("has ten attempts with the pauses of the specification, then ends", () => {
    expect(MOST_ATTEMPTS).toBe(10)
    const pauses = minutes.map((_, index) => nextAttemptAfter(index + 1, now, 0)!.getTime() - now.getTime())
    expect(pauses).toEqual(minutes.map((minute) => minute * 60_000))
    expect(nextAttemptAfter(10, now, 0)).toBeUndefined()
  })

  it("adds a tenth of the pause at most by chance", () => {
    for (const attempts of minutes.keys()) {
      const [least, most] = [0, 0.999].map((chance) => nextAttemptAfter(attempts + 1, now, chance)!.getTime())
      const pause = least! - now.getTime()
      expect(most! - least!).toBeGreaterThan(0.09 * pause)
      expect(most! - least!).toBeLessThan(0.1 * pause)
    }
  })
})

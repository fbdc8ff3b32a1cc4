import { RateLimiterMemory, RateLimiterRes } from "rate-limiter-flexible"

/** How a limit stands after a call was counted. */
export interface RateState {
  readonly allowed: boolean
  readonly remaining: number
  readonly reset_s: number
}

/** Counts calls in fixed windows. Adapters differ in how many processes share the count. */
export interface RateLimiter {
  /** Counts one call of `subject` against `points` in `window_s` seconds. */
  take(subject: string, limit: { points: number; window_s: number }): Promise<RateState>
}

/** Counts within this process. */
export function createMemoryRateLimiter(): RateLimiter {
  const limiters = new Map<string, RateLimiterMemory>()
  return {
    async take(subject, { points, window_s }) {
      const name = `${points}/${window_s}`
      let limiter = limiters.get(name)
      if (!limiter) {
        limiter = new RateLimiterMemory({ points, duration: window_s, keyPrefix: name })
        limiters.set(name, limiter)
      }
      try {
        return stateOf(await limiter.consume(subject), true)
      } catch (refusal) {
        if (refusal instanceof RateLimiterRes) return stateOf(refusal, false)
        throw refusal
      }
    },
  }
}

const shared = globalThis as typeof globalThis & { tarnwrightRateLimiter?: RateLimiter }

/** The limiter of this process. */
export function rateLimiter(): RateLimiter {
  shared.tarnwrightRateLimiter ??= createMemoryRateLimiter()
  return shared.tarnwrightRateLimiter
}

function stateOf(result: RateLimiterRes, allowed: boolean): RateState {
  return { allowed, remaining: result.remainingPoints, reset_s: Math.ceil(result.msBeforeNext / 1000) }
}

import { Redis } from "ioredis"
import {
  type RateLimiterAbstract,
  RateLimiterMemory,
  RateLimiterRedis,
  RateLimiterRes,
} from "rate-limiter-flexible"
import { env } from "@/lib/env"

/** How a limit stands after a call was counted. */
export interface RateState {
  readonly allowed: boolean
  readonly remaining: number
  readonly reset_s: number
}

/** Most calls in a window. */
export interface RateLimit {
  readonly points: number
  readonly window_s: number
}

/** Counts calls in fixed windows. Adapters differ in how many processes share the count. */
export interface RateLimiter {
  /** Counts one call of `subject` against the limit. */
  take(subject: string, limit: RateLimit): Promise<RateState>
}

/** Counts within this process: right for one process, and for what needs no more than a rough bound. */
export function createMemoryRateLimiter(): RateLimiter {
  return counting(
    ({ points, window_s }) => new RateLimiterMemory({ points, duration: window_s, keyPrefix: "" }),
  )
}

/**
 * Counts in Redis (or Valkey), for all processes together. While it cannot be reached each process counts for itself:
 * the rate is a courtesy among neighbours, what is paid for is held exactly by the ledger.
 */
export function createRedisRateLimiter(redis: Redis): RateLimiter {
  return counting(({ points, window_s }) => {
    const insurance = new RateLimiterMemory({ points, duration: window_s, keyPrefix: "" })
    return new RateLimiterRedis({
      storeClient: redis,
      points,
      duration: window_s,
      keyPrefix: `tarnwright:rate:${points}/${window_s}`,
      insuranceLimiter: insurance,
      rejectIfRedisNotReady: true,
    })
  })
}

const shared = globalThis as typeof globalThis & { tarnwrightRateLimiter?: RateLimiter }

/** The limiter of this process: in Redis where `REDIS_URL` names one, in memory otherwise. */
export function rateLimiter(): RateLimiter {
  shared.tarnwrightRateLimiter ??= createRateLimiter()
  return shared.tarnwrightRateLimiter
}

function createRateLimiter(): RateLimiter {
  const url = env().REDIS_URL
  if (!url) return createMemoryRateLimiter()
  const redis = new Redis(url, { enableOfflineQueue: false, maxRetriesPerRequest: 1 })
  // The client connects again by itself; without a listener a lost connection would end the process.
  redis.on("error", () => {})
  return createRedisRateLimiter(redis)
}

function counting(create: (limit: RateLimit) => RateLimiterAbstract): RateLimiter {
  const limiters = new Map<string, RateLimiterAbstract>()
  return {
    async take(subject, limit) {
      const name = `${limit.points}/${limit.window_s}`
      let limiter = limiters.get(name)
      if (!limiter) {
        limiter = create(limit)
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

function stateOf(result: RateLimiterRes, allowed: boolean): RateState {
  return { allowed, remaining: result.remainingPoints, reset_s: Math.ceil(result.msBeforeNext / 1000) }
}

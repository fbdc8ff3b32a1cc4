/** One limit as it stands after a call. `window_s`: its length; `reset_s`: when it is whole again. */
export interface LimitState {
  readonly name: "burst" | "period" | "day"
  readonly quota: number
  readonly window_s: number
  readonly remaining: number
  readonly reset_s: number
}

/**
 * `RateLimit` and `RateLimit-Policy`.
 *
 * @source draft-ietf-httpapi-ratelimit-headers-10, sections 3 and 4: still a draft, so its syntax lives here alone.
 */
export function rateHeaders(limits: readonly LimitState[]): Record<string, string> {
  if (limits.length === 0) return {}
  return {
    "ratelimit-policy": limits
      .map(({ name, quota, window_s }) => `"${name}";q=${quota};w=${window_s}`)
      .join(", "),
    ratelimit: limits
      .map(
        ({ name, remaining, reset_s }) => `"${name}";r=${Math.max(0, remaining)};t=${Math.max(0, reset_s)}`,
      )
      .join(", "),
  }
}

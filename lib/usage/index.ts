export { commitUsage, type MeteredCall, SANDBOX_UNITS_A_DAY, type UsageReceipt } from "./commit"
export { type Quota, quotaOf } from "./quota"
export { createMemoryRateLimiter, type RateLimiter, type RateState, rateLimiter } from "./rate-limiter"
export { type UsageQuery, type UsageRow, usageBy } from "./usage-by"

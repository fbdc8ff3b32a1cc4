export { commitUsage, type MeteredCall, SANDBOX_UNITS_A_DAY, type UsageReceipt } from "./commit"
export { databaseAnswers } from "./database-answers"
export {
  claimIdempotencyKey,
  freeIdempotencyKey,
  type IdempotentCall,
  type KeptAnswer,
  keepAnswer,
} from "./idempotency"
export { LOG_DAYS, type LoggedCall, type LogQuery, listCalls } from "./list-calls"
export { logRefusal, type Refusal } from "./log-refusal"
export { type Quota, quotaOf } from "./quota"
export { createMemoryRateLimiter, type RateLimiter, type RateState, rateLimiter } from "./rate-limiter"
export { type UsageQuery, type UsageRow, usageBy } from "./usage-by"

export { ANNOUNCE_THRESHOLD, announceThreshold, type ReachedThreshold } from "./announce-threshold"
export { commitUsage, type MeteredRun, SANDBOX_UNITS_A_DAY, type UsageReceipt } from "./commit"
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
export { dropOldPartitions, makePartitions } from "./partitions"
export { type Quota, quotaOf } from "./quota"
export {
  createMemoryRateLimiter,
  createRedisRateLimiter,
  type RateLimiter,
  type RateState,
  rateLimiter,
} from "./rate-limiter"
export { type Drift, describeDrift, reconcileUsage } from "./reconcile"
export { deleteExpired, ENQUIRY_DAYS } from "./retention"
export { type RolledHours, rollUpUsage } from "./roll-up"
export { PORTAL_KEY_ID, quotaReached, spendUnits } from "./spend"
export { type UsageQuery, type UsageRow, usageBy } from "./usage-by"
export { type ExposedKey, WARN_OF_EXPOSED_KEY, warnOfExposedKey } from "./warn-of-exposed-key"

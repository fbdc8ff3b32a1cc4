export {
  asAdmin,
  asWorker,
  closePools,
  pool,
  statement,
  type Trx,
  withoutTenant,
  withTenant,
  withUser,
} from "./client"
export { enqueueJob, type Job } from "./enqueue-job"
export { type Listener, listen } from "./listen"
export type { AccountStatus, KeyKind, KeyMode, Role, Schema } from "./schema"
export { DatabaseUnavailable } from "./unavailable"

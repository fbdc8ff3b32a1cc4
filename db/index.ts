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
export { type Listener, listen } from "./listen"
export type { AccountStatus, KeyKind, KeyMode, Role, Schema } from "./schema"
export { DatabaseUnavailable } from "./unavailable"

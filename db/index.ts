export { asAdmin, asWorker, closePools, pool, type Trx, withoutTenant, withTenant, withUser } from "./client"
export type { AccountStatus, KeyKind, KeyMode, Role, Schema } from "./schema"

import { sql } from "kysely"
import { type AccountStatus, asAdmin } from "@/db"

/** An account as the platform's admin sees it. */
export interface AccountForAdmin {
  readonly id: string
  readonly slug: string
  readonly name: string
  readonly plan: string
  readonly status: AccountStatus
  readonly created_at: Date
  readonly members: number
  readonly keys_in_force: number
  readonly live_units: number
  readonly unit_cap: number
}

/** Every account, newest first, with its live units of the period that is running. For the platform's admin alone. */
export function listAccountsForAdmin({ now }: { now: Date }): Promise<AccountForAdmin[]> {
  return asAdmin((trx) =>
    trx
      .selectFrom("account")
      .select((select) => [
        "account.id",
        "account.slug",
        "account.name",
        "account.plan",
        "account.status",
        "account.created_at",
        "account.unit_cap",
        select
          .selectFrom("membership")
          .select(sql<number>`count(*)`.as("count"))
          .whereRef("membership.account_id", "=", "account.id")
          .$asScalar()
          .$notNull()
          .as("members"),
        select
          .selectFrom("api_key")
          .select(sql<number>`count(*)`.as("count"))
          .whereRef("api_key.account_id", "=", "account.id")
          .where("revoked_at", "is", null)
          .where((where) => where.or([where("expires_at", "is", null), where("expires_at", ">", now)]))
          .$asScalar()
          .$notNull()
          .as("keys_in_force"),
        select
          .selectFrom("usage_counter")
          .select(sql<number>`coalesce(sum(units), 0)`.as("units"))
          .whereRef("usage_counter.account_id", "=", "account.id")
          .where("mode", "=", "live")
          .where("period_start", "<=", now)
          .where("period_end", ">", now)
          .$asScalar()
          .$notNull()
          .as("live_units"),
      ])
      .orderBy("account.created_at", "desc")
      .execute(),
  )
}

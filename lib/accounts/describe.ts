import { type AccountStatus, withTenant } from "@/db"
import type { Ctx } from "@/lib/context"

/** An account as its own keys may see it: nothing about the people in it. */
export interface AccountDescription {
  readonly id: string
  readonly slug: string
  readonly name: string
  readonly plan: string
  readonly status: AccountStatus
  readonly unit_cap: number
  readonly overage_cap_minor: number
  readonly created_at: Date
}

/** The account of the call. */
export function describeAccount({ ctx }: { ctx: Ctx }): Promise<AccountDescription> {
  return withTenant(ctx.account_id, (trx) =>
    trx
      .selectFrom("account")
      .select(["id", "slug", "name", "plan", "status", "unit_cap", "overage_cap_minor", "created_at"])
      .where("id", "=", ctx.account_id)
      .executeTakeFirstOrThrow(),
  )
}

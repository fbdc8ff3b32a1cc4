import { asWorker } from "@/db"
import { type PlanId, plans, unitCapOf } from "@/lib/billing/plans"
import type { Ctx } from "@/lib/context"
import { newId } from "@/lib/id"
import { createKey, type KeyRow, type NewKey } from "@/lib/keys"

export interface TestAccount {
  readonly ctx: Ctx
  readonly slug: string
  /** Makes a key of the account: live, for servers, to calculate, unless the test says otherwise. */
  key(settings?: Partial<NewKey>): Promise<{ key: KeyRow; secret: string }>
}

/** An account of the suite's own, so that no test wipes a table or meets another's rows. Call `takeSettings` first. */
export async function createTestAccount(
  options: { plan?: PlanId; unit_cap?: number } = {},
): Promise<TestAccount> {
  const plan = options.plan ?? "brand"
  const account_id = newId("account")
  const slug = `test-${account_id.slice(-20)}`
  await asWorker((trx) =>
    trx
      .insertInto("account")
      .values({
        id: account_id,
        slug,
        name: "A test's account",
        plan,
        unit_cap: options.unit_cap ?? unitCapOf(plans[plan], 0),
      })
      .execute(),
  )
  const ctx: Ctx = { account_id, actor: { kind: "system", id: "test" }, now: new Date() }
  return {
    ctx,
    slug,
    key: (settings = {}) =>
      createKey({
        ctx: { ...ctx, now: new Date() },
        input: { kind: "server", mode: "live", name: "Test key", scopes: ["calculate"], ...settings },
      }),
  }
}

import type { Trx } from "@/db"
import { planOf } from "@/lib/billing/plans"
import { TarnwrightError } from "@/lib/errors"

/** How many belong to an account already, and how many are invited whose link still works. */
export async function countPlaces(
  trx: Trx,
  account_id: string,
  now: Date,
): Promise<{ members: number; invited: number }> {
  const [members, invited] = [
    await trx
      .selectFrom("membership")
      .select((select) => select.fn.countAll<number>().as("count"))
      .where("account_id", "=", account_id)
      .executeTakeFirstOrThrow(),
    await trx
      .selectFrom("invitation")
      .select((select) => select.fn.countAll<number>().as("count"))
      .where("account_id", "=", account_id)
      .where("expires_at", ">", now)
      .executeTakeFirstOrThrow(),
  ]
  return { members: members.count, invited: invited.count }
}

/** @throws TarnwrightError `plan_limit_reached` when a plan has no place for one more beside those who are `taken`. */
export function refuseWhenFull(plan: string, taken: number): void {
  const { name, team } = planOf(plan)
  if (team === null || taken < team) return
  throw new TarnwrightError(
    "plan_limit_reached",
    `${name} holds ${team} people, with those who are invited. Remove one, or choose a larger plan under Billing.`,
  )
}

import { withTenant } from "@/db"
import { type Action, recordAct } from "@/lib/audit"
import { listMemberships } from "./memberships"
import type { Visitor } from "./person"

/** Writes what a person did to their own sign-in into the audit trail of every account they belong to. */
export async function recordOfPerson(visitor: Visitor, user_id: string, action: Action): Promise<void> {
  for (const { account, role } of await listMemberships({ user_id })) {
    const ctx = {
      account_id: account.id,
      actor: { kind: "user", id: user_id, role },
      ip: visitor.ip,
      request_id: visitor.request_id,
      now: visitor.now,
    } as const
    await withTenant(account.id, (trx) => recordAct(trx, ctx, { action, target: user_id }))
  }
}

import type { Trx } from "@/db"
import { recordAct } from "@/lib/audit"
import type { Visitor } from "./person"

/** What the new account and its owner are called. The ids are made by the caller, who must be in the new tenant. */
export interface NewAccount {
  readonly account_id: string
  readonly user_id: string
  readonly organisation: string
}

/** Opens an account with one owner and says under which slug. */
export async function openAccount(trx: Trx, visitor: Visitor, input: NewAccount): Promise<string> {
  const slug = await insertAccount(trx, input)
  await trx
    .insertInto("membership")
    .values({ account_id: input.account_id, user_id: input.user_id, role: "owner", created_at: visitor.now })
    .execute()
  await recordAct(
    trx,
    {
      account_id: input.account_id,
      actor: { kind: "user", id: input.user_id, role: "owner" },
      ip: visitor.ip,
      request_id: visitor.request_id,
      now: visitor.now,
    },
    { action: "account.created", target: input.account_id, detail: { slug, name: input.organisation } },
  )
  return slug
}

/** A name as it may stand in an address: `Fernhollow Aquatics` → `fernhollow-aquatics`. */
export function slugOf(name: string): string {
  const plain = name
    .normalize("NFKD")
    .replace(/\p{M}/gu, "")
    .toLowerCase()
    .replace(/[^a-z0-9]+/g, "-")
    .slice(0, 30)
    .replace(/^-+|-+$/g, "")
  return plain.length >= 2 ? plain : `account-${plain || "1"}`
}

async function insertAccount(trx: Trx, { account_id, organisation }: NewAccount): Promise<string> {
  const base = slugOf(organisation)
  for (let attempt = 1; ; attempt++) {
    const slug = attempt === 1 ? base : `${base}-${attempt}`
    const inserted = await trx
      .insertInto("account")
      .values({ id: account_id, slug, name: organisation })
      .onConflict((conflict) => conflict.column("slug").doNothing())
      .executeTakeFirst()
    if (inserted.numInsertedOrUpdatedRows === 1n) return slug
  }
}

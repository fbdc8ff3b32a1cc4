import { type AccountStatus, type Role, type Trx, withUser } from "@/db"

/** An account that a person belongs to, and as what. */
export interface Membership {
  readonly account: {
    readonly id: string
    readonly slug: string
    readonly name: string
    readonly plan: string
    readonly status: AccountStatus
  }
  readonly role: Role
}

/** The accounts of a person, by name. */
export async function listMemberships({ user_id }: { user_id: string }): Promise<Membership[]> {
  const rows = await withUser(user_id, (trx) => ofPerson(trx, user_id).orderBy("account.name").execute())
  return rows.map(toMembership)
}

/** A person's place in the account of this slug; undefined when there is none, or no such account. */
export async function findMembership({
  user_id,
  slug,
}: {
  user_id: string
  slug: string
}): Promise<Membership | undefined> {
  const row = await withUser(user_id, (trx) =>
    ofPerson(trx, user_id).where("account.slug", "=", slug).executeTakeFirst(),
  )
  return row && toMembership(row)
}

function ofPerson(trx: Trx, user_id: string) {
  return trx
    .selectFrom("membership")
    .innerJoin("account", "account.id", "membership.account_id")
    .select([
      "account.id",
      "account.slug",
      "account.name",
      "account.plan",
      "account.status",
      "membership.role",
    ])
    .where("membership.user_id", "=", user_id)
}

function toMembership({ role, ...account }: Membership["account"] & { role: Role }): Membership {
  return { account, role }
}

import type { Role, Trx } from "@/db"
import { env } from "@/lib/env"
import { enqueueMail } from "./enqueue"
import type { Content } from "./letters"

/** What a letter about an account says of it. */
export interface AboutAccount {
  readonly account_name: string
  /** Where its portal begins, without a slash at the end. */
  readonly portal_url: string
}

/** Puts a letter to each owner of an account on the queue, in the caller's transaction. */
export function notifyOwners(
  trx: Trx,
  account_id: string,
  write: (about: AboutAccount) => Content,
): Promise<void> {
  return notifyRoles(trx, account_id, ["owner"], write)
}

/** The same to everybody who has one of the roles. */
export async function notifyRoles(
  trx: Trx,
  account_id: string,
  roles: readonly Role[],
  write: (about: AboutAccount) => Content,
): Promise<void> {
  const people = await trx
    .selectFrom("membership")
    .innerJoin("app_user", "app_user.id", "membership.user_id")
    .innerJoin("account", "account.id", "membership.account_id")
    .select(["app_user.email", "account.name", "account.slug"])
    .where("membership.account_id", "=", account_id)
    .where("membership.role", "in", roles)
    .orderBy("membership.created_at")
    .execute()
  for (const { email, name, slug } of people) {
    const content = write({ account_name: name, portal_url: `${env().PUBLIC_URL}/portal/${slug}` })
    await enqueueMail(trx, { ...content, to: email })
  }
}

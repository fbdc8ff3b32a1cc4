import { asWorker } from "@/db"
import { TarnwrightError } from "@/lib/errors"

/**
 * Id of the account with a slug, for scripts of the operator, who has no membership.
 *
 * @throws TarnwrightError `not_found`.
 */
export async function accountIdOfSlug(slug: string): Promise<string> {
  const row = await asWorker((trx) =>
    trx.selectFrom("account").select("id").where("slug", "=", slug).executeTakeFirst(),
  )
  if (!row) throw new TarnwrightError("not_found", `There is no account with the slug "${slug}".`)
  return row.id
}

/**
 * Id of the account that a key belongs to, for scripts of the operator.
 *
 * @throws TarnwrightError `not_found`.
 */
export async function accountIdOfKey(key_id: string): Promise<string> {
  const row = await asWorker((trx) =>
    trx.selectFrom("api_key").select("account_id").where("id", "=", key_id).executeTakeFirst(),
  )
  if (!row) throw new TarnwrightError("not_found", `There is no key with the id "${key_id}".`)
  return row.account_id
}

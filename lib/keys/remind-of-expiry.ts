import { sql } from "kysely"
import { asWorker, type Trx } from "@/db"
import { notifyOwners } from "@/lib/mail"

/** Days before a key's end at which its owners are reminded. @source PLATFORM 2.8 */
const REMINDER_DAYS = [14, 7, 1] as const

/**
 * Reminds the owners of each key that ends soon: once at each mark, and of the nearest mark alone when several have
 * passed. A key that was made after a mark, or whose successor was made already, is spared the early ones.
 *
 * @returns how many keys the owners were reminded of
 */
export async function remindOfExpiry(): Promise<number> {
  return asWorker(async (trx) => {
    const keys = await keysToRemindOf(trx)
    for (const key of keys) {
      await notifyOwners(trx, key.account_id, ({ account_name, portal_url }) => ({
        template: "key_expiring",
        data: {
          account_name,
          key_name: key.name,
          last4: key.last4,
          expires_at: key.expires_at.toISOString(),
          rotated: key.rotated,
          keys_url: `${portal_url}/keys`,
        },
      }))
    }
    return keys.length
  })
}

interface EndingKey {
  account_id: string
  name: string
  last4: string
  expires_at: Date
  rotated: boolean
}

/** Keys at whose mark nobody was reminded yet; noting that they are now is part of the same statement. */
async function keysToRemindOf(trx: Trx): Promise<EndingKey[]> {
  const { rows } = await sql<EndingKey>`
    with due as (
      select k.account_id, k.id, k.expires_at, k.name, k.last4, k.successor_id is not null as rotated,
             min(mark.days) as days
        from api_key k
        cross join unnest(${sql.val([...REMINDER_DAYS])}::integer[]) as mark (days)
       where k.revoked_at is null and k.expires_at > now()
         and k.expires_at <= now() + make_interval(days => mark.days)
         and k.created_at <= k.expires_at - make_interval(days => mark.days)
       group by 1, 2, 3, 4, 5, 6
    ), noted as (
      insert into key_reminder (account_id, key_id, expires_at, days_before)
        select account_id, id, expires_at, days from due where not rotated or days = 1
      on conflict do nothing
      returning account_id, key_id
    )
    select due.* from due join noted on noted.account_id = due.account_id and noted.key_id = due.id
     order by due.account_id, due.id`.execute(trx)
  return rows
}

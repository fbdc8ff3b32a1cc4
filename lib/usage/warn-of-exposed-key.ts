import { asWorker } from "@/db"
import { notifyOwners } from "@/lib/mail"

/** Name of the job that warns of a server key in a browser; `scripts/worker.ts` has its task. */
export const WARN_OF_EXPOSED_KEY = "warn_of_exposed_key"

/** A call with a server key that a browser made, as the request log names it. */
export interface ExposedKey {
  readonly account_id: string
  readonly key_id: string
  readonly refusal_id: string
}

/** Warns the owners that a server key stands in a web page: of each key by the first such call of a UTC day. */
export async function warnOfExposedKey({ account_id, key_id, refusal_id }: ExposedKey): Promise<void> {
  await asWorker(async (trx) => {
    const today = new Date()
    today.setUTCHours(0, 0, 0, 0)
    const first = await trx
      .selectFrom("refused_call")
      .select("id")
      .where("account_id", "=", account_id)
      .where("key_id", "=", key_id)
      .where("code", "=", "server_key_in_browser")
      .where("at", ">=", today)
      .orderBy("at")
      .orderBy("id")
      .limit(1)
      .executeTakeFirst()
    if (first?.id !== refusal_id) return
    const { name, last4 } = await trx
      .selectFrom("api_key")
      .select(["name", "last4"])
      .where("account_id", "=", account_id)
      .where("id", "=", key_id)
      .executeTakeFirstOrThrow()
    await notifyOwners(trx, account_id, ({ account_name, portal_url }) => ({
      template: "key_exposed",
      data: { account_name, key_name: name, last4, keys_url: `${portal_url}/keys` },
    }))
  })
}

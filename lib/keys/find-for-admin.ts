import { asAdmin } from "@/db"
import { type KeyRow, keyColumns } from "./row"

/** A key with the account it belongs to, as the platform's admin sees it. */
export type FoundKey = KeyRow & { readonly account_slug: string; readonly account_name: string }

/** Keys of any account whose id, or whose last four characters, are the text. For the platform's admin alone. */
export function findKeysForAdmin({ input }: { input: { readonly text: string } }): Promise<FoundKey[]> {
  return asAdmin((trx) =>
    trx
      .selectFrom("api_key")
      .innerJoin("account", "account.id", "api_key.account_id")
      .select(keyColumns.map((column) => `api_key.${column}` as const))
      .select(["account.slug as account_slug", "account.name as account_name"])
      .where((where) =>
        where.or([where("api_key.id", "=", input.text), where("api_key.last4", "=", input.text)]),
      )
      .orderBy("api_key.created_at", "desc")
      .limit(100)
      .execute(),
  )
}

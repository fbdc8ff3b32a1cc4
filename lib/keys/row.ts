import type { Selectable } from "kysely"
import type { Schema } from "@/db"

/** A key as people may see it: never the secret, never its digest. */
export type KeyRow = Omit<Selectable<Schema["api_key"]>, "digest" | "pepper_version">

/** The columns of a {@link KeyRow}. */
export const keyColumns = [
  "account_id",
  "id",
  "kind",
  "mode",
  "name",
  "last4",
  "scopes",
  "origins",
  "cidrs",
  "created_by",
  "created_at",
  "expires_at",
  "last_used_at",
  "revoked_at",
  "revoked_by",
  "revoked_reason",
  "successor_id",
] as const satisfies readonly (keyof KeyRow)[]

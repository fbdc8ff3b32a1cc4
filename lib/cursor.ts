import { createHmac, hkdfSync, timingSafeEqual } from "node:crypto"
import type { Ctx } from "@/lib/context"
import { env } from "@/lib/env"
import { TarnwrightError } from "@/lib/errors"

/**
 * A page of a list, from one row more than it holds: the row too many says that there is a next one.
 *
 * `list` names the list with its filters, `position` says where a row stands in it.
 */
export function pageOf<Row>(
  ctx: Ctx,
  list: string,
  rows: readonly Row[],
  limit: number,
  position: (row: Row) => string,
): { data: Row[]; next_cursor: string | null } {
  const data = rows.slice(0, limit)
  const last = rows.length > limit ? data.at(-1) : undefined
  return { data, next_cursor: last === undefined ? null : cursorOf(ctx, list, position(last)) }
}

/**
 * Where the page before ended. A cursor is good for its own list, its own filters and its own account.
 *
 * @throws TarnwrightError `validation_failed` when it was not made here for this list.
 */
export function positionOf(ctx: Ctx, list: string, cursor: string): string {
  const [text = "", mac = ""] = cursor.split(".")
  const position = Buffer.from(text, "base64url").toString()
  const [given, right] = [Buffer.from(mac), Buffer.from(macOf(ctx, list, position))]
  if (given.length === right.length && timingSafeEqual(given, right)) return position
  const detail = "This cursor belongs to another list. Begin without one, or send `next_cursor` as it came."
  throw new TarnwrightError("validation_failed", detail, { errors: [{ pointer: "/cursor", detail }] })
}

function cursorOf(ctx: Ctx, list: string, position: string): string {
  return `${Buffer.from(position).toString("base64url")}.${macOf(ctx, list, position)}`
}

function macOf({ account_id }: Ctx, list: string, position: string): string {
  return createHmac("sha256", key())
    .update(JSON.stringify([account_id, list, position]))
    .digest("base64url")
    .slice(0, 22)
}

let derived: Buffer | undefined

function key(): Buffer {
  derived ??= Buffer.from(
    hkdfSync("sha256", Buffer.from(env().ENCRYPTION_KEY, "base64"), "", "list cursors", 32),
  )
  return derived
}

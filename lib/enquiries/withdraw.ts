import { createHmac, hkdfSync, timingSafeEqual } from "node:crypto"
import { withTenant } from "@/db"
import type { Ctx } from "@/lib/context"
import { env } from "@/lib/env"
import { TarnwrightError } from "@/lib/errors"
import { eraseEnquiry } from "./erase"
import { findEnquiry } from "./find"

/** What a shopper's link leads to. */
export interface Withdrawal {
  readonly shop_name: string
  readonly language: string
  readonly created_at: Date
  readonly erased_at: Date | null
}

/** The last part of a shopper's link: names one enquiry, and cannot be made up for another. */
export function withdrawalToken(account_id: string, enquiry_id: string): string {
  const text = Buffer.from(`${account_id}/${enquiry_id}`).toString("base64url")
  return `${text}.${macOf(text)}`
}

/**
 * What the link is about.
 *
 * @throws TarnwrightError `not_found` when it is not one of ours or the enquiry is not kept any more.
 */
export async function showWithdrawal({ token, now }: { token: string; now: Date }): Promise<Withdrawal> {
  const { ctx, enquiry_id } = opened(token, now)
  return withTenant(ctx.account_id, async (trx) => {
    const { language, created_at, erased_at } = await findEnquiry(trx, ctx, enquiry_id)
    const { name: shop_name } = await trx
      .selectFrom("account")
      .select("name")
      .where("id", "=", ctx.account_id)
      .executeTakeFirstOrThrow()
    return { shop_name, language, created_at, erased_at }
  })
}

/**
 * Takes the consent back: erases the enquiry as its shop would.
 *
 * @throws TarnwrightError `not_found` as {@link showWithdrawal}.
 */
export async function withdraw({ token, now }: { token: string; now: Date }): Promise<void> {
  const { ctx, enquiry_id } = opened(token, now)
  await eraseEnquiry({ ctx, input: { enquiry_id } })
}

function opened(token: string, now: Date): { ctx: Ctx; enquiry_id: string } {
  const [text = "", mac = ""] = token.split(".")
  const [given, right] = [Buffer.from(mac), Buffer.from(macOf(text))]
  const [account_id, enquiry_id] = Buffer.from(text, "base64url").toString().split("/")
  if (given.length !== right.length || !timingSafeEqual(given, right) || !account_id || !enquiry_id) {
    throw new TarnwrightError("not_found", "This link leads to no enquiry. Open it as it stands in the mail.")
  }
  return { ctx: { account_id, actor: { kind: "system", id: "shopper" }, now }, enquiry_id }
}

function macOf(text: string): string {
  return createHmac("sha256", key()).update(text).digest("base64url")
}

let derived: Buffer | undefined

function key(): Buffer {
  derived ??= Buffer.from(
    hkdfSync("sha256", Buffer.from(env().ENCRYPTION_KEY, "base64"), "", "enquiry withdrawal", 32),
  )
  return derived
}

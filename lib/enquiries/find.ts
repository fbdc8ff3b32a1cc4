import { type Trx, withTenant } from "@/db"
import type { Call, Ctx } from "@/lib/context"
import { TarnwrightError } from "@/lib/errors"
import { type Enquiry, enquiryColumns, enquiryOf } from "./enquiry"

export interface EnquiryQuery {
  readonly limit: number
  /** Id of the last enquiry of the page before; ids sort by the time they were made. */
  readonly before?: string | undefined
  readonly widget_id?: string | undefined
}

/** The account's enquiries, newest first; of erased ones what is left. */
export async function listEnquiries({ ctx, input }: Call<EnquiryQuery>): Promise<Enquiry[]> {
  const stored = await withTenant(ctx.account_id, (trx) => {
    let query = trx.selectFrom("enquiry").select(enquiryColumns).where("account_id", "=", ctx.account_id)
    if (input.widget_id) query = query.where("widget_id", "=", input.widget_id)
    if (input.before) query = query.where("id", "<", input.before)
    return query.orderBy("id", "desc").limit(input.limit).execute()
  })
  return stored.map(enquiryOf)
}

/** @throws TarnwrightError `not_found` when the account has no such enquiry. */
export function showEnquiry({ ctx, input }: Call<{ readonly enquiry_id: string }>): Promise<Enquiry> {
  return withTenant(ctx.account_id, (trx) => findEnquiry(trx, ctx, input.enquiry_id))
}

/** The same, in a transaction of the caller's. */
export async function findEnquiry(trx: Trx, ctx: Ctx, enquiry_id: string): Promise<Enquiry> {
  const stored = await trx
    .selectFrom("enquiry")
    .select(enquiryColumns)
    .where("account_id", "=", ctx.account_id)
    .where("id", "=", enquiry_id)
    .executeTakeFirst()
  if (!stored) throw new TarnwrightError("not_found", "There is no such enquiry in this account.")
  return enquiryOf(stored)
}

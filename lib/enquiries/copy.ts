import { asWorker } from "@/db"
import { env } from "@/lib/env"
import type { Tank } from "@/lib/insights"
import { deliverMail, type Language } from "@/lib/mail"
import { withdrawalToken } from "./withdraw"

/** Name of the job that mails a shopper their copy; `scripts/worker.ts` has its task. */
export const SEND_ENQUIRY_COPY = "send_enquiry_copy"

export interface EnquiryCopy {
  readonly account_id: string
  readonly enquiry_id: string
}

/** Mails a shopper what they asked, in their language, with the way to take it back. Does nothing once it is erased. */
export async function sendEnquiryCopy({ account_id, enquiry_id }: EnquiryCopy): Promise<void> {
  const enquiry = await asWorker((trx) =>
    trx
      .selectFrom("enquiry")
      .innerJoin("account", "account.id", "enquiry.account_id")
      .select(["enquiry.email", "enquiry.name", "enquiry.message", "enquiry.tank", "enquiry.language"])
      .select("account.name as shop_name")
      .where("enquiry.account_id", "=", account_id)
      .where("enquiry.id", "=", enquiry_id)
      .executeTakeFirst(),
  )
  if (!enquiry?.email || enquiry.message === null) return
  const { email: to, shop_name, name, message } = enquiry
  const withdraw_url = `${env().PUBLIC_URL}/withdraw/${withdrawalToken(account_id, enquiry_id)}`
  const data = {
    language: enquiry.language as Language,
    shop_name,
    name,
    message,
    tank: enquiry.tank as Tank | null,
    withdraw_url,
  }
  await deliverMail({ template: "enquiry_copy", data, to }, enquiry_id)
}

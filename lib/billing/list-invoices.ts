import { withTenant } from "@/db"
import { authorize } from "@/lib/accounts"
import type { Call } from "@/lib/context"

export interface InvoiceRow {
  readonly id: string
  readonly number: string | null
  /** Stripe's word: open, paid, void, uncollectible. */
  readonly status: string
  readonly amount_minor: number
  readonly currency: string
  /** Stripe's page of the invoice, where an open one can be paid. */
  readonly hosted_url: string | null
  readonly issued_at: Date
}

/** The account's invoices, newest first. @throws TarnwrightError `forbidden` */
export function listInvoices({ ctx }: Pick<Call<never>, "ctx">): Promise<InvoiceRow[]> {
  authorize(ctx.actor, "billing.read")
  return withTenant(ctx.account_id, (trx) =>
    trx
      .selectFrom("invoice")
      .select(["id", "number", "status", "amount_minor", "currency", "hosted_url", "issued_at"])
      .where("account_id", "=", ctx.account_id)
      .orderBy("issued_at", "desc")
      .orderBy("id", "desc")
      .execute(),
  )
}

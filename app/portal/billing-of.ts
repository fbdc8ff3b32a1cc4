import { type Billing, type InvoiceRow, listInvoices, showBilling } from "@/lib/billing"
import type { Ctx } from "@/lib/context"

export interface BillingPage extends Billing {
  readonly invoices: readonly InvoiceRow[]
}

/** How the account stands and what it was billed. */
export async function billingOf({ ctx }: { ctx: Ctx }): Promise<BillingPage> {
  const [billing, invoices] = await Promise.all([showBilling({ ctx }), listInvoices({ ctx })])
  return { ...billing, invoices }
}

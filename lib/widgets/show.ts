import { type Trx, withTenant } from "@/db"
import { planOf } from "@/lib/billing/plans"
import type { Call, Ctx } from "@/lib/context"
import type { Calculator } from "./calculators"
import { findWidget } from "./find"
import type { WidgetSettings } from "./settings"

/** What a page has to know to show a widget. Nothing in it is secret. */
export interface ShownWidget {
  readonly calculator: Calculator
  readonly settings: WidgetSettings
  /** Whether the plan asks for our credit line. */
  readonly credit_line: boolean
}

/**
 * One of the account's widgets as a page shows it.
 *
 * @throws TarnwrightError `not_found` when the account has no such widget.
 */
export function showWidget({ ctx, input }: Call<{ readonly widget_id: string }>): Promise<ShownWidget> {
  return withTenant(ctx.account_id, (trx) => shownWidget(trx, ctx, input.widget_id))
}

/** The same, in a transaction of the caller's. */
export async function shownWidget(trx: Trx, ctx: Ctx, widget_id: string): Promise<ShownWidget> {
  const { calculator, settings } = await findWidget(trx, ctx, widget_id)
  const { plan } = await trx
    .selectFrom("account")
    .select("plan")
    .where("id", "=", ctx.account_id)
    .executeTakeFirstOrThrow()
  return { calculator, settings, credit_line: planOf(plan).credit_line }
}

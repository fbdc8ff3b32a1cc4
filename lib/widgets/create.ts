import { type Trx, withTenant } from "@/db"
import { recordAct } from "@/lib/audit"
import { planOf } from "@/lib/billing/plans"
import type { Call } from "@/lib/context"
import { TarnwrightError } from "@/lib/errors"
import { newId } from "@/lib/id"
import type { Calculator } from "./calculators"
import { refuseUnfit } from "./name-and-origins"
import { type WidgetRow, widgetRow } from "./row"
import { parseSettings } from "./settings"

export interface NewWidget {
  readonly calculator: Calculator
  readonly name: string
  readonly origins: readonly string[]
  /** What differs from the defaults of `widgetSettings`. */
  readonly settings?: Record<string, unknown>
}

/**
 * Makes a widget that works on pages of its origins.
 *
 * @throws TarnwrightError `validation_failed` when the name, an origin or a setting is not valid,
 * `plan_limit_reached` when the plan includes no more widgets that are switched on.
 */
export async function createWidget({ ctx, input }: Call<NewWidget>): Promise<WidgetRow> {
  refuseUnfit(input)
  const settings = parseSettings(input.settings ?? {}, input.origins)
  return withTenant(ctx.account_id, async (trx) => {
    await refuseBeyondPlan(trx, ctx.account_id)
    const stored = await trx
      .insertInto("widget")
      .values({
        account_id: ctx.account_id,
        id: newId("widget"),
        calculator: input.calculator,
        name: input.name.trim(),
        origins: [...input.origins],
        settings: JSON.stringify(settings),
        created_at: ctx.now,
        updated_at: ctx.now,
        disabled_at: null,
      })
      .returningAll()
      .executeTakeFirstOrThrow()
    await recordAct(trx, ctx, {
      action: "widget.created",
      target: stored.id,
      detail: { name: stored.name, calculator: stored.calculator, origins: stored.origins },
    })
    return widgetRow(stored)
  })
}

/**
 * Refuses one more widget that is switched on than the plan includes. The account's row stays locked until the
 * transaction ends, so that two at once cannot both be the last one.
 *
 * @throws TarnwrightError `plan_limit_reached`
 */
export async function refuseBeyondPlan(trx: Trx, account_id: string): Promise<void> {
  const account = await trx
    .selectFrom("account")
    .select("plan")
    .where("id", "=", account_id)
    .forUpdate()
    .executeTakeFirstOrThrow()
  const { name, widgets: limit } = planOf(account.plan)
  if (limit === null) return
  const { on } = await trx
    .selectFrom("widget")
    .select((select) => select.fn.countAll<number>().as("on"))
    .where("account_id", "=", account_id)
    .where("disabled_at", "is", null)
    .executeTakeFirstOrThrow()
  if (on < limit) return
  const included = limit === 1 ? "one widget" : `${limit} widgets`
  const detail = `The plan ${name} includes ${included}. Switch one off, or choose a larger plan.`
  throw new TarnwrightError("plan_limit_reached", detail)
}

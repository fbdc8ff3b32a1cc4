import { withTenant } from "@/db"
import { recordAct } from "@/lib/audit"
import type { Call } from "@/lib/context"
import { refuseBeyondPlan } from "./create"
import { findWidget } from "./find"
import { refuseUnfit } from "./name-and-origins"
import { type WidgetRow, widgetRow } from "./row"
import { parseSettings } from "./settings"

export interface WidgetChange {
  readonly widget_id: string
  readonly name?: string
  readonly origins?: readonly string[]
  /** Replaces all settings; what it leaves out has its default. */
  readonly settings?: Record<string, unknown>
  /** A widget that is switched off shows the page's own fallback. */
  readonly disabled?: boolean
}

/**
 * Changes one of the account's widgets. Pages that show it need no change: they read it anew.
 *
 * @throws TarnwrightError `not_found` when the account has no such widget, `validation_failed`
 * and, when it is switched on again, `plan_limit_reached` as `createWidget`.
 */
export async function updateWidget({ ctx, input }: Call<WidgetChange>): Promise<WidgetRow> {
  return withTenant(ctx.account_id, async (trx) => {
    const before = await findWidget(trx, ctx, input.widget_id)
    const name = (input.name ?? before.name).trim()
    const origins = [...(input.origins ?? before.origins)]
    refuseUnfit({ name, origins })
    const settings = parseSettings(input.settings ?? before.settings, origins)
    if (before.disabled_at && input.disabled === false) await refuseBeyondPlan(trx, ctx.account_id)
    const disabled_at = input.disabled === undefined ? before.disabled_at : disabledAt(input.disabled)
    const stored = await trx
      .updateTable("widget")
      .set({ name, origins, settings: JSON.stringify(settings), disabled_at, updated_at: ctx.now })
      .where("account_id", "=", ctx.account_id)
      .where("id", "=", input.widget_id)
      .returningAll()
      .executeTakeFirstOrThrow()
    await recordAct(trx, ctx, {
      action: "widget.changed",
      target: stored.id,
      detail: { name, origins, settings, disabled: disabled_at !== null },
    })
    return widgetRow(stored)

    function disabledAt(disabled: boolean): Date | null {
      return disabled ? (before.disabled_at ?? ctx.now) : null
    }
  })
}

import { withTenant } from "@/db"
import type { Call } from "@/lib/context"
import type { Tank } from "./tank"

export interface TankEvent {
  readonly widget_id: string
  /** The page view's session: what it tells later takes the place of what it told before. */
  readonly session_id: string
  readonly tank: Tank
}

/** Keeps what a widget was asked about on one page view, under the day and nothing more exact. */
export async function recordTank({ ctx, input }: Call<TankEvent>): Promise<void> {
  const { widget_id, session_id, tank } = input
  const figures = {
    volume_l: tank.volume_l ?? null,
    ph: tank.ph ?? null,
    kh_dkh: tank.kh_dkh ?? null,
    temperature_c: tank.temperature_c ?? null,
    method: tank.method ?? null,
    level: tank.level ?? null,
    verdict: tank.verdict ?? null,
  }
  await withTenant(ctx.account_id, (trx) =>
    trx
      .insertInto("tank_event")
      .values({
        account_id: ctx.account_id,
        session_id,
        widget_id,
        day: ctx.now.toISOString().slice(0, 10),
        ...figures,
      })
      .onConflict((conflict) => conflict.columns(["account_id", "session_id"]).doUpdateSet(figures))
      .execute(),
  )
}

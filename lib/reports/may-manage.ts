import { authorize } from "@/lib/accounts"
import type { Ctx } from "@/lib/context"
import type { ReportLine } from "./report"

/** @throws TarnwrightError `forbidden` when the person may not manage this report; a key has a scope for it. */
export function authorizeOn(ctx: Ctx, { created_by }: Pick<ReportLine, "created_by">): void {
  if (ctx.actor.kind !== "key") authorize(ctx.actor, "report.manage", { by: created_by })
}

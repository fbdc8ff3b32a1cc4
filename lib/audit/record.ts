import type { Trx } from "@/db"
import type { Ctx } from "@/lib/context"
import { newId } from "@/lib/id"

/** One act that changed something. `detail` holds what changed, never a secret. */
export interface Act {
  readonly action: Action
  /** Id of what was acted on. */
  readonly target?: string
  readonly detail?: Readonly<Record<string, unknown>>
}

/** Every act that is recorded, with the words by which the audit trail names it. */
export const actionNames = {
  "account.created": "Account opened",
  "account.renamed": "Account renamed",
  "account.export_asked": "Archive of the data asked for",
  "account.export_fetched": "Archive of the data fetched",
  "account.closed": "Account closed, to be deleted",
  "account.reopened": "Deletion of the account taken back",
  "person.password_reset": "Password set anew",
  "person.password_changed": "Password changed",
  "person.second_factor_set_up": "Second factor set up",
  "person.second_factor_removed": "Second factor removed",
  "person.recovery_codes_renewed": "Recovery codes made anew",
  "team.invited": "Person invited",
  "team.invitation_resent": "Invitation sent again",
  "team.invitation_revoked": "Invitation taken back",
  "team.joined": "Invitation accepted",
  "team.role_changed": "Role changed",
  "team.removed": "Person removed",
  "team.left": "Person left",
  "key.created": "Key created",
  "key.rotated": "Key rotated",
  "key.revoked": "Key revoked",
  "widget.created": "Widget created",
  "widget.changed": "Widget changed",
  "webhook.created": "Webhook endpoint created",
  "webhook.changed": "Webhook endpoint changed",
  "webhook.secret_rotated": "Webhook secret rotated",
  "webhook.disabled": "Webhook endpoint switched off",
  "webhook.deleted": "Webhook endpoint deleted",
  "billing.checkout_started": "Checkout opened",
  "billing.portal_opened": "Billing portal opened",
  "billing.plan_change_asked": "Change of plan asked for",
  "billing.plan_change_taken_back": "Change of plan taken back",
  "billing.spending_cap_set": "Spending cap set",
  "subscription.changed": "Subscription changed",
  "catalog.item_created": "Catalogue item added",
  "catalog.item_changed": "Catalogue item changed",
  "catalog.item_deleted": "Catalogue item deleted",
  "catalog.imported": "Catalogue imported",
  "enquiry.erased": "Enquiry erased",
  "enquiry.exported": "Enquiries exported",
  "report.created": "Report made",
  "report.deleted": "Report deleted",
  "report.shared": "Report shared",
  "report.sent": "Report sent by mail",
  "report.unshared": "Sharing of a report ended",
} as const

export type Action = keyof typeof actionNames

/** Appends an act to the audit trail, in the transaction of the act itself: neither exists without the other. */
export async function recordAct(trx: Trx, ctx: Ctx, act: Act): Promise<void> {
  await trx
    .insertInto("audit_log")
    .values({
      account_id: ctx.account_id,
      id: newId("audit"),
      at: ctx.now,
      actor_kind: ctx.actor.kind,
      actor_id: ctx.actor.id,
      action: act.action,
      target: act.target ?? null,
      detail: JSON.stringify(act.detail ?? {}),
      ip: ctx.ip ?? null,
      request_id: ctx.request_id ?? null,
    })
    .execute()
}

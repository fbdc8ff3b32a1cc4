import { enqueueJob, type Trx, withTenant } from "@/db"
import type { Call, Ctx } from "@/lib/context"
import { TarnwrightError } from "@/lib/errors"
import { newId } from "@/lib/id"
import type { Tank } from "@/lib/insights"
import { type Language, notifyRoles } from "@/lib/mail"
import { publishEvent } from "@/lib/webhooks"
import { findWidget } from "@/lib/widgets"
import { type Consent, consentOf } from "./consent"
import { SEND_ENQUIRY_COPY } from "./copy"

export interface NewEnquiry {
  readonly widget_id: string
  /** Origin of the page on which the shopper wrote. */
  readonly page_origin: string
  readonly language: Language
  readonly name?: string | undefined
  readonly email: string
  readonly message: string
  readonly tank?: Tank | undefined
  /** `version` names the words that were shown beside the box. */
  readonly consent: { readonly given: boolean; readonly version: string }
}

export interface SentEnquiry {
  readonly enquiry_id: string
  readonly created_at: Date
}

/**
 * Keeps what a shopper asks, tells the shop, and mails the shopper a copy.
 *
 * @throws TarnwrightError `validation_failed` without the shopper's consent to the words as they stand now,
 * `not_found` when the widget takes no enquiries.
 */
export function sendEnquiry({ ctx, input }: Call<NewEnquiry>): Promise<SentEnquiry> {
  return withTenant(ctx.account_id, async (trx) => {
    const consent = await agreed(trx, ctx, input)
    const enquiry_id = newId("enquiry")
    await trx
      .insertInto("enquiry")
      .values({
        account_id: ctx.account_id,
        id: enquiry_id,
        widget_id: input.widget_id,
        page_origin: input.page_origin,
        language: input.language,
        name: input.name?.trim() || null,
        email: input.email,
        message: input.message.trim(),
        tank: input.tank ? JSON.stringify(input.tank) : null,
        consent_version: consent.version,
        consent_wording: consent.wording,
        consented_at: ctx.now,
        created_at: ctx.now,
        erased_at: null,
        erased_by: null,
      })
      .execute()
    await tellTheShop(trx, ctx, input.widget_id, enquiry_id)
    // Names the row and holds none of it: what is erased before the mail leaves is not in the queue either.
    const payload = { account_id: ctx.account_id, enquiry_id }
    await enqueueJob(trx, { task: SEND_ENQUIRY_COPY, payload })
    return { enquiry_id, created_at: ctx.now }
  })
}

/** The words that a shopper agrees to before they may ask this widget's shop. */
export function consentFor({
  ctx,
  input,
}: Call<{ readonly widget_id: string; readonly language: Language }>): Promise<
  Consent & { readonly shop_name: string; readonly privacy_url: string }
> {
  return withTenant(ctx.account_id, async (trx) => {
    const privacy_url = await privacyUrlOf(trx, ctx, input.widget_id)
    const shop_name = await shopName(trx, ctx)
    return { ...consentOf(shop_name, input.language), shop_name, privacy_url }
  })
}

async function agreed(trx: Trx, ctx: Ctx, { widget_id, language, consent }: NewEnquiry): Promise<Consent> {
  await privacyUrlOf(trx, ctx, widget_id)
  if (!consent.given) {
    throw refusal(
      "/consent/given",
      "Nothing is kept without the shopper's consent. Show the words beside a box, and send true once it is ticked.",
    )
  }
  const current = consentOf(await shopName(trx, ctx), language)
  if (consent.version !== current.version) {
    throw refusal(
      "/consent/version",
      "These are not the words as they stand now. Show the current ones and ask again.",
    )
  }
  return current
}

async function tellTheShop(trx: Trx, ctx: Ctx, widget_id: string, enquiry_id: string): Promise<void> {
  await publishEvent(trx, ctx.account_id, "enquiry.created", {
    enquiry_id,
    widget_id,
    created_at: ctx.now.toISOString(),
  })
  const { name: widget_name } = await findWidget(trx, ctx, widget_id)
  // Without a word of the shopper's: a mailbox is out of reach when they want it erased.
  await notifyRoles(trx, ctx.account_id, ["owner", "merchandiser"], ({ account_name, portal_url }) => ({
    template: "enquiry_received",
    data: { account_name, widget_name, enquiry_url: `${portal_url}/enquiries?open=${enquiry_id}` },
  }))
}

async function privacyUrlOf(trx: Trx, ctx: Ctx, widget_id: string): Promise<string> {
  const { settings } = await findWidget(trx, ctx, widget_id)
  if (settings.enquiries) return settings.enquiries.privacy_url
  throw new TarnwrightError("not_found", "This widget takes no enquiries. Switch them on in its settings.")
}

async function shopName(trx: Trx, ctx: Ctx): Promise<string> {
  const { name } = await trx
    .selectFrom("account")
    .select("name")
    .where("id", "=", ctx.account_id)
    .executeTakeFirstOrThrow()
  return name
}

function refusal(pointer: string, detail: string): TarnwrightError {
  return new TarnwrightError("validation_failed", detail, { errors: [{ pointer, detail }] })
}

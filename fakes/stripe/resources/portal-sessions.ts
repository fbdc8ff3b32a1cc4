import { z } from "zod"
import { invalid } from "../core/errors"
import { idOf } from "../core/fake"
import { newId } from "../core/ids"
import { str } from "../core/params"
import { route } from "../core/route"

const flow = z.discriminatedUnion("type", [
  z.strictObject({ type: z.literal("payment_method_update"), after_completion: z.unknown().optional() }),
  z.strictObject({
    type: z.literal("subscription_cancel"),
    subscription_cancel: z.strictObject({ subscription: str }),
    after_completion: z.unknown().optional(),
  }),
])

export const portalSessions = [
  route(
    "POST",
    "/v1/billing_portal/sessions",
    z.strictObject({
      customer: str,
      return_url: z.url({ protocol: /^https?$/ }).optional(),
      flow_data: flow.optional(),
      locale: str.optional(),
    }),
    ({ fake, params }) => {
      const customer = fake.get("customer", params.customer, "customer")
      const cancel =
        params.flow_data?.type === "subscription_cancel" ? params.flow_data.subscription_cancel : null
      if (cancel && idOf(fake.get("subscription", cancel.subscription).customer) !== customer.id) {
        throw invalid(
          "The subscription belongs to another customer.",
          "flow_data[subscription_cancel][subscription]",
        )
      }
      const id = newId("bps")
      return fake.put("billing_portal.session", {
        id,
        object: "billing_portal.session",
        configuration: "bpc_default",
        created: fake.now(customer.id),
        customer: customer.id,
        customer_account: null,
        flow: params.flow_data
          ? {
              after_completion: { hosted_confirmation: null, redirect: null, type: "portal_homepage" },
              customer_update: null,
              subscription_cancel: cancel ? { retention: null, subscription: cancel.subscription } : null,
              subscription_pause: null,
              subscription_update: null,
              subscription_update_confirm: null,
              type: params.flow_data.type,
            }
          : null,
        livemode: false,
        locale: params.locale ?? null,
        on_behalf_of: null,
        return_url: params.return_url ?? null,
        url: `${fake.base}/portal/${id}`,
      })
    },
  ),
]

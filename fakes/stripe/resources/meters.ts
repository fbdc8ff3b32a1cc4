import { z } from "zod"
import { usage } from "../billing/metering"
import { ApiError, invalid } from "../core/errors"
import { newId } from "../core/ids"
import { page as pageOf } from "../core/lists"
import { count, page, str } from "../core/params"
import { route } from "../core/route"

const HOUR_S = 3600
const DAY_S = 86_400

export const meters = [
  route(
    "POST",
    "/v1/billing/meters",
    z.strictObject({
      display_name: str.max(250),
      event_name: str.max(100),
      default_aggregation: z.strictObject({ formula: z.enum(["sum", "count", "last"]) }),
      event_time_window: z.enum(["hour", "day"]).optional(),
      customer_mapping: z
        .strictObject({ type: z.literal("by_id"), event_payload_key: str })
        .default({ type: "by_id", event_payload_key: "stripe_customer_id" }),
      value_settings: z.strictObject({ event_payload_key: str }).default({ event_payload_key: "value" }),
    }),
    ({ fake, params }) => {
      const taken = fake
        .all("billing.meter")
        .some((one) => one.event_name === params.event_name && one.status === "active")
      if (taken)
        throw invalid(`An active meter already exists for event_name ${params.event_name}.`, "event_name")
      const now = fake.now()
      const meter = fake.put("billing.meter", {
        id: newId("mtr"),
        object: "billing.meter",
        created: now,
        customer_mapping: params.customer_mapping,
        default_aggregation: params.default_aggregation,
        display_name: params.display_name,
        event_name: params.event_name,
        event_time_window: params.event_time_window ?? null,
        livemode: false,
        status: "active",
        status_transitions: { deactivated_at: null },
        updated: now,
        value_settings: params.value_settings,
      })
      fake.emit("billing.meter.created", meter)
      return meter
    },
  ),
  route(
    "GET",
    "/v1/billing/meters",
    z.strictObject({ ...page, status: z.enum(["active", "inactive"]).optional() }),
    ({ fake, params }) => {
      const found = fake.all("billing.meter").filter((one) => !params.status || one.status === params.status)
      return pageOf(found, params, "/v1/billing/meters")
    },
  ),
  route("GET", "/v1/billing/meters/:id", z.strictObject({}), ({ fake, path }) =>
    fake.get("billing.meter", path.id!),
  ),
  route("POST", "/v1/billing/meters/:id", z.strictObject({ display_name: str }), ({ fake, params, path }) => {
    const meter = fake.get("billing.meter", path.id!)
    Object.assign(meter, { display_name: params.display_name, updated: fake.now() })
    fake.changed()
    return meter
  }),
  route("POST", "/v1/billing/meters/:id/deactivate", z.strictObject({}), ({ fake, path }) => {
    const meter = fake.get("billing.meter", path.id!)
    if (meter.status === "inactive")
      throw new ApiError(400, { type: "invalid_request_error", message: "Inactive." })
    const now = fake.now()
    Object.assign(meter, { status: "inactive", status_transitions: { deactivated_at: now }, updated: now })
    fake.changed()
    return meter
  }),
  route(
    "GET",
    "/v1/billing/meters/:id/event_summaries",
    z.strictObject({
      ...page,
      customer: str,
      start_time: count,
      end_time: count,
      value_grouping_window: z.enum(["hour", "day"]).optional(),
    }),
    ({ fake, params, path }) => {
      const meter = fake.get("billing.meter", path.id!)
      const { customer, start_time: from, end_time: to, value_grouping_window: window } = params
      const step = window === "hour" ? HOUR_S : window === "day" ? DAY_S : to - from
      const grain = window === "hour" ? HOUR_S : window === "day" ? DAY_S : 60
      if (to <= from) throw invalid("end_time must be after start_time.", "end_time")
      for (const [name, value] of [
        ["start_time", from],
        ["end_time", to],
      ] as const) {
        if (value % grain !== 0)
          throw invalid(`${name} must align with ${window ?? "minute"} boundaries.`, name)
      }
      const summaries = []
      for (let start = from; start < to; start += step) {
        const value = usage(fake, meter, customer, start, start + step)
        if (window && value === 0) continue
        summaries.push({
          id: `mtrusg_${meter.id.slice(4)}${start}`,
          object: "billing.meter_event_summary" as const,
          aggregated_value: value,
          end_time: start + step,
          livemode: false,
          meter: meter.id,
          start_time: start,
        })
      }
      return pageOf(
        summaries,
        { ...params, created: undefined },
        `/v1/billing/meters/${meter.id}/event_summaries`,
      )
    },
  ),
]

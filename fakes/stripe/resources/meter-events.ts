import { z } from "zod"
import { ApiError, invalid } from "../core/errors"
import type { Fake } from "../core/fake"
import { takeFault } from "../core/faults"
import { newId } from "../core/ids"
import { count, str } from "../core/params"
import { route } from "../core/route"

const DAY_S = 86_400
const OLDEST_S = 35 * DAY_S
const NEWEST_S = 5 * 60

interface Sent {
  eventName: string
  payload: Record<string, string>
  identifier: string
  timestamp: number
}

export const meterEvents = [
  route(
    "POST",
    "/v1/billing/meter_events",
    z.strictObject({
      event_name: str.max(100),
      payload: z.record(z.string(), z.string()),
      identifier: str.max(100).optional(),
      timestamp: count.optional(),
    }),
    ({ fake, params }) => {
      const sent = take(fake, {
        eventName: params.event_name,
        payload: params.payload,
        identifier: params.identifier ?? newId("mtrevt"),
        timestamp: params.timestamp ?? fake.now(),
      })
      return {
        object: "billing.meter_event",
        created: fake.now(),
        event_name: sent.eventName,
        identifier: sent.identifier,
        livemode: false,
        payload: sent.payload,
        timestamp: sent.timestamp,
      }
    },
  ),
  route(
    "POST",
    "/v2/billing/meter_events",
    z.strictObject({
      event_name: z.string().min(1).max(100),
      payload: z.record(z.string(), z.string()),
      identifier: z.string().min(1).max(100).optional(),
      timestamp: z.iso.datetime({ offset: true }).optional(),
    }),
    ({ fake, params }) => {
      const sent = take(fake, {
        eventName: params.event_name,
        payload: params.payload,
        identifier: params.identifier ?? newId("mtrevt"),
        timestamp: params.timestamp ? Math.floor(Date.parse(params.timestamp) / 1000) : fake.now(),
      })
      return {
        object: "v2.billing.meter_event",
        created: new Date().toISOString(),
        event_name: sent.eventName,
        identifier: sent.identifier,
        livemode: false,
        payload: sent.payload,
        timestamp: new Date(sent.timestamp * 1000).toISOString(),
      }
    },
  ),
  route(
    "POST",
    "/v1/billing/meter_event_adjustments",
    z.strictObject({
      event_name: str,
      type: z.literal("cancel"),
      cancel: z.strictObject({ identifier: str }),
    }),
    ({ fake, params }) => {
      const { identifier } = params.cancel
      const reading = fake.state.readings.find((one) => one.identifier === identifier && !one.cancelled)
      if (!reading)
        throw invalid(`No event with identifier ${identifier}.`, "cancel[identifier]", "resource_missing")
      if (fake.now() - reading.received > DAY_S) {
        throw invalid("Events can be cancelled within 24 hours only.", "cancel[identifier]")
      }
      reading.cancelled = true
      fake.changed()
      return {
        object: "billing.meter_event_adjustment",
        cancel: { identifier },
        event_name: params.event_name,
        livemode: false,
        status: "complete",
        type: "cancel",
      }
    },
  ),
]

/**
 * Takes a reading. What can be judged at once is refused at once; a missing meter or customer is told of later by a
 * thin event, as the real service does.
 *
 * @throws ApiError 400 for a repeated identifier, which the SDK must not try again, or a timestamp out of range
 */
function take(fake: Fake, sent: Sent): Sent {
  const now = fake.now()
  const repeated = fake.state.readings.some(
    (one) => one.identifier === sent.identifier && now - one.received < DAY_S,
  )
  if (repeated) {
    const message = `An event already exists with identifier ${sent.identifier}.`
    throw new ApiError(400, { type: "invalid_request_error", message, param: "identifier" }, false)
  }
  if (sent.timestamp < now - OLDEST_S) {
    throw invalid("The timestamp is more than 35 days in the past.", "timestamp", "timestamp_too_far_in_past")
  }
  if (sent.timestamp > now + NEWEST_S) {
    throw invalid("The timestamp is more than 5 minutes in the future.", "timestamp", "timestamp_in_future")
  }
  const meter = fake
    .all("billing.meter")
    .find((one) => one.event_name === sent.eventName && one.status === "active")
  if (!meter) {
    report(fake, "v1.billing.meter.no_meter_found", null, "no_meter", sent)
    return sent
  }
  const value = sent.payload[meter.value_settings.event_payload_key]
  if (value === undefined || !/^\d{1,15}$/.test(value)) {
    throw invalid("The value must be a whole number, as text.", "payload")
  }
  const customer = sent.payload[meter.customer_mapping.event_payload_key]
  if (customer === undefined) throw invalid("The payload names no customer.", "payload")
  const known = fake.state.objects.customer[customer]
  const failed = takeFault(fake.state, ["meter_async_error"], { customer })
  if (!known || "deleted" in known || failed) {
    const related = { id: meter.id, type: "billing.meter", url: `/v1/billing/meters/${meter.id}` }
    const code = failed ? "archived_meter" : "meter_event_customer_not_found"
    report(fake, "v1.billing.meter.error_report_triggered", related, code, sent)
    return sent
  }
  fake.state.readings.push({
    meter_event_name: sent.eventName,
    identifier: sent.identifier,
    customer,
    value: Number(value),
    timestamp: sent.timestamp,
    received: now,
    cancelled: false,
  })
  fake.changed()
  return sent
}

function report(
  fake: Fake,
  type: string,
  related: { id: string; type: string; url: string } | null,
  code: string,
  sent: Sent,
): void {
  const at = new Date().toISOString()
  fake.emitThin(type, related, {
    developer_message_summary: "There is 1 invalid event",
    reason: {
      error_count: 1,
      error_types: [
        {
          code,
          error_count: 1,
          sample_errors: [{ error_message: code, request: { identifier: sent.identifier } }],
        },
      ],
    },
    validation_end: at,
    validation_start: at,
  })
}

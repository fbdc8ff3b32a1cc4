import type { IncomingMessage, ServerResponse } from "node:http"
import { z } from "zod"
import { runDue } from "../billing/due"
import { setStatus } from "../billing/status"
import { readBody, sendJson } from "./answer"
import { ApiError, invalid } from "./errors"
import type { Fake } from "./fake"
import { faultRequest } from "./faults"

const SETTLE_MS = 30_000

const status = z.strictObject({ status: z.enum(["active", "past_due", "unpaid", "canceled", "paused"]) })
const settings = z.strictObject({ after_dunning: z.enum(["canceled", "unpaid", "past_due"]) })
const resend = z.strictObject({ event: z.string() })

/**
 * What tests and demonstrations do that no client of the real service could:
 *
 *     POST   /_fake/faults                      spoil the next calls or deliveries (fakes/stripe/core/faults.ts)
 *     GET    /_fake/faults                      what is still set
 *     DELETE /_fake/faults                      take all back, send what was held
 *     GET    /_fake/deliveries                  every delivery with its attempts
 *     POST   /_fake/deliveries {event}          send an event once more
 *     POST   /_fake/settle                      wait until nothing is left to deliver
 *     POST   /_fake/tick                        do what is due in real time now, instead of within half a minute
 *     POST   /_fake/settings {after_dunning}    where a subscription goes when a renewal cannot be collected
 *     POST   /_fake/subscriptions/ID {status}   put a subscription into a status, with the event that belongs to it
 */
export async function serveControl(
  fake: Fake,
  incoming: IncomingMessage,
  response: ServerResponse,
): Promise<void> {
  try {
    const path = new URL(incoming.url ?? "/", fake.base).pathname.replace("/_fake/", "")
    const text = await readBody(incoming)
    const answer = await run(fake, `${incoming.method} ${path}`, text === "" ? {} : JSON.parse(text))
    sendJson(response, 200, JSON.stringify(answer, null, 2))
  } catch (error) {
    if (error instanceof ApiError) sendJson(response, error.status, JSON.stringify({ error: error.body }))
    else if (error instanceof SyntaxError || error instanceof z.ZodError) {
      sendJson(response, 400, JSON.stringify({ error: { message: error.message } }))
    } else throw error
  }
}

async function run(fake: Fake, what: string, body: unknown): Promise<object> {
  const { state, deliveries } = fake
  switch (what) {
    case "POST faults": {
      const fault = faultRequest.parse(body)
      state.faults.push(fault)
      return fault
    }
    case "GET faults":
      return state.faults
    case "DELETE faults":
      state.faults = []
      deliveries.release()
      return state.faults
    case "GET deliveries":
      return state.deliveries
    case "POST deliveries":
      return { endpoints: deliveries.resend(resend.parse(body).event) }
    case "POST settle":
      return { idle: await settled(fake) }
    case "POST tick":
      runDue(fake, null, fake.now())
      return {}
    case "POST settings":
      state.afterDunning = settings.parse(body).after_dunning
      fake.changed()
      return { after_dunning: state.afterDunning }
  }
  const id = /^POST subscriptions\/(\w+)$/.exec(what)?.[1]
  if (!id) throw invalid(`There is no ${what}.`)
  const subscription = fake.get("subscription", id)
  setStatus(fake, subscription, status.parse(body).status)
  return subscription
}

async function settled(fake: Fake): Promise<boolean> {
  const until = Date.now() + SETTLE_MS
  while (!fake.deliveries.isIdle()) {
    if (Date.now() > until) return false
    await new Promise((resolve) => setTimeout(resolve, 20))
  }
  return true
}

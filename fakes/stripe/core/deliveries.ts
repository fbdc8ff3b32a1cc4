import type { Fake } from "./fake"
import { takeFault } from "./faults"
import { newId } from "./ids"
import { signatureHeader } from "./signature"

/** The endpoint of the start options, as against those made through the API. */
const CONFIGURED = "configured"
/** Seconds to the next attempt; the last one repeats until the event is three days old. */
const BACKOFF_S = [1, 2, 5, 10, 30, 60, 300, 900, 3600]
const GIVE_UP_MS = 72 * 3600 * 1000
const TIMEOUT_MS = 10_000
const PARALLEL = 8
const KEPT = 1000

type Flaw = "webhook_drop" | "webhook_bad_signature" | "webhook_stale" | "webhook_future"

export interface Delivery {
  id: string
  event: string
  type: string
  endpoint: string
  state: "held" | "pending" | "delivered" | "given_up"
  made_ms: number
  due_ms: number
  /** Spoils the first attempt only. */
  flaw: Flaw | null
  attempts: { at_ms: number; status: number | null; flaw: Flaw | null }[]
}

/** Sends signed events to the endpoints, in no promised order, again and again until each is accepted. */
export class Deliveries {
  private readonly sending = new Set<string>()
  private timer: NodeJS.Timeout | undefined
  private running = false

  constructor(private readonly fake: Fake) {}

  start(): void {
    this.running = true
    this.pump()
  }

  stop(): void {
    this.running = false
    clearTimeout(this.timer)
  }

  /** Queues an event for the endpoints that want it; returns how many there are. */
  queue(event: string, type: string, style: "snapshot" | "thin"): number {
    const endpoints = this.endpointsFor(type, style)
    for (const endpoint of endpoints) this.add(event, type, endpoint)
    this.trim()
    this.pump()
    return endpoints.length
  }

  /** Queues an event once more, whatever became of it before. */
  resend(event: string): number {
    const known = this.fake.state.objects.event[event] ?? this.fake.state.objects["v2.core.event"][event]
    return known ? this.queue(event, known.type, known.object === "event" ? "snapshot" : "thin") : 0
  }

  /** Sends what is held back for reordering, latest first. */
  release(): void {
    const held = this.fake.state.deliveries.filter((delivery) => delivery.state === "held").reverse()
    for (const [index, delivery] of held.entries()) {
      delivery.state = "pending"
      delivery.due_ms = Date.now() + index * 30
    }
    this.pump()
  }

  isIdle(): boolean {
    return !this.fake.state.deliveries.some((delivery) => delivery.state === "pending")
  }

  private endpointsFor(type: string, style: "snapshot" | "thin"): string[] {
    const made = this.fake
      .all("webhook_endpoint")
      .filter((endpoint) => endpoint.status === "enabled" && style === "snapshot")
      .filter((endpoint) => endpoint.enabled_events.some((wanted) => wanted === "*" || wanted === type))
    return [...(this.fake.options.webhookUrl ? [CONFIGURED] : []), ...made.map((endpoint) => endpoint.id)]
  }

  private add(event: string, type: string, endpoint: string): void {
    const { state } = this.fake
    const delay = takeFault(state, ["webhook_delay"], { type })
    const copies = takeFault(state, ["webhook_duplicate"], { type })?.copies ?? 0
    const reorder = takeFault(state, ["webhook_reorder"], { type })
    const flaw = takeFault(
      state,
      ["webhook_drop", "webhook_bad_signature", "webhook_stale", "webhook_future"],
      { type },
    )
    const now = Date.now()
    for (let copy = 0; copy <= copies; copy += 1) {
      state.deliveries.push({
        id: newId("dlv"),
        event,
        type,
        endpoint,
        state: reorder ? "held" : "pending",
        made_ms: now,
        due_ms: now + (delay?.seconds ?? 0) * 1000,
        flaw: flaw?.kind ?? null,
        attempts: [],
      })
    }
    if (reorder?.times === 0) this.release()
  }

  private pump(): void {
    clearTimeout(this.timer)
    if (!this.running) return
    const waiting = this.fake.state.deliveries
      .filter((delivery) => delivery.state === "pending" && !this.sending.has(delivery.id))
      .sort((a, b) => a.due_ms - b.due_ms)
    for (const delivery of waiting) {
      if (delivery.due_ms > Date.now() || this.sending.size >= PARALLEL) break
      void this.attempt(delivery)
    }
    const next = waiting.find((delivery) => !this.sending.has(delivery.id))
    if (next && this.sending.size < PARALLEL) {
      this.timer = setTimeout(() => this.pump(), Math.max(10, next.due_ms - Date.now()))
    }
  }

  private async attempt(delivery: Delivery): Promise<void> {
    this.sending.add(delivery.id)
    const flaw = delivery.attempts.length === 0 ? delivery.flaw : null
    const started = Date.now()
    const status = flaw === "webhook_drop" ? null : await this.send(delivery, flaw)
    delivery.attempts.push({ at_ms: started, status, flaw })
    if (status !== null && status >= 200 && status < 300) {
      delivery.state = "delivered"
    } else if (Date.now() - delivery.made_ms > GIVE_UP_MS) {
      delivery.state = "given_up"
    } else {
      const wait = BACKOFF_S[Math.min(delivery.attempts.length, BACKOFF_S.length) - 1]!
      delivery.due_ms = Date.now() + wait * 1000
    }
    this.sending.delete(delivery.id)
    this.fake.changed()
    this.pump()
  }

  /** Status of the answer, or null when there was none. */
  private async send(delivery: Delivery, flaw: Flaw | null): Promise<number | null> {
    const target = this.target(delivery.endpoint)
    const payload = this.payload(delivery.event)
    if (!target || !payload) return 410
    const shift = flaw === "webhook_stale" ? -600 : flaw === "webhook_future" ? 86_400 : 0
    const secret = flaw === "webhook_bad_signature" ? `${target.secret}x` : target.secret
    try {
      const answer = await fetch(target.url, {
        method: "POST",
        headers: {
          "content-type": "application/json; charset=utf-8",
          "user-agent": "payments-stand-in/1",
          "stripe-signature": signatureHeader(payload, secret, Math.floor(Date.now() / 1000) + shift),
        },
        body: payload,
        redirect: "manual",
        signal: AbortSignal.timeout(TIMEOUT_MS),
      })
      await answer.arrayBuffer()
      return answer.status
    } catch {
      return null
    }
  }

  private target(endpoint: string): { url: string; secret: string } | undefined {
    const { webhookUrl, webhookSecret } = this.fake.options
    if (endpoint === CONFIGURED) return webhookUrl ? { url: webhookUrl, secret: webhookSecret } : undefined
    const made = this.fake.state.objects.webhook_endpoint[endpoint]
    return made?.secret ? { url: made.url, secret: made.secret } : undefined
  }

  private payload(event: string): string | undefined {
    const snapshot = this.fake.state.objects.event[event]
    if (snapshot) return JSON.stringify(snapshot, null, 2)
    const thin = this.fake.state.objects["v2.core.event"][event]
    return thin && JSON.stringify({ ...thin, data: undefined }, null, 2)
  }

  private trim(): void {
    const { state } = this.fake
    const settled = state.deliveries.filter((one) => one.state === "delivered" || one.state === "given_up")
    if (settled.length <= KEPT) return
    const dropped = new Set(settled.slice(0, settled.length - KEPT).map((one) => one.id))
    state.deliveries = state.deliveries.filter((one) => !dropped.has(one.id))
  }
}

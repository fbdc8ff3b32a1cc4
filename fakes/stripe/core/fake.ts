import type Stripe from "stripe"
import { Deliveries } from "./deliveries"
import { missing } from "./errors"
import { newId } from "./ids"
import { type Kind, type Objects, type State, saveState } from "./state"

/** Version of the API that this stand-in speaks; the SDK pins the same one. */
export const API_VERSION = "2026-10-28.endive" satisfies Stripe.LatestApiVersion

export interface FakeOptions {
  secretKey: string
  webhookSecret: string
  /** Endpoint that receives every event, signed with `webhookSecret`. */
  webhookUrl?: string | undefined
  stateFile?: string | undefined
}

/** One stand-in: its objects, its clock and its outgoing events. */
export class Fake {
  readonly deliveries: Deliveries
  /** The API request being served, which events name as their cause. */
  cause: { id: string | null; idempotency_key: string | null } = { id: null, idempotency_key: null }
  private saving: NodeJS.Timeout | undefined

  constructor(
    readonly options: FakeOptions,
    readonly state: State,
  ) {
    this.deliveries = new Deliveries(this)
  }

  get base(): string {
    return this.state.base
  }

  /** Unix seconds, by the test clock that the customer is attached to if there is one. */
  now(customer?: string | null): number {
    const clock = customer && this.state.objects.customer[customer]?.test_clock
    const frozen = clock && this.state.objects["test_helpers.test_clock"][String(clock)]?.frozen_time
    return frozen || Math.floor(Date.now() / 1000)
  }

  all<Name extends Kind>(kind: Name): Objects[Name][] {
    return Object.values(this.state.objects[kind]) as Objects[Name][]
  }

  /** @throws ApiError 404 `resource_missing`, also for what was deleted */
  get<Name extends Kind>(kind: Name, id: string, param?: string): Objects[Name] {
    const found = this.state.objects[kind][id] as Objects[Name] | undefined
    if (!found || "deleted" in found) throw missing(kind, id, param)
    return found
  }

  put<Name extends Kind>(kind: Name, object: Objects[Name]): Objects[Name] {
    ;(this.state.objects[kind] as Record<string, Objects[Name]>)[object.id] = object
    this.changed()
    return object
  }

  /** Records a snapshot event and queues it for every endpoint that asked for its type. */
  emit(type: string, object: object, previous?: Record<string, unknown>): void {
    const customer = (object as { customer?: unknown }).customer
    const snapshot = structuredClone(object) as Record<string, unknown>
    const event = this.put("event", {
      id: newId("evt"),
      object: "event",
      api_version: API_VERSION,
      created: this.now(typeof customer === "string" ? customer : null),
      data: { object: snapshot, ...(previous && { previous_attributes: structuredClone(previous) }) },
      livemode: false,
      pending_webhooks: 0,
      request: { ...this.cause },
      type,
    })
    event.pending_webhooks = this.deliveries.queue(event.id, type, "snapshot")
  }

  /** Records a thin event, of which the endpoint learns the type and the address alone. */
  emitThin(type: string, related: { id: string; type: string; url: string } | null, data: object): void {
    const event = this.put("v2.core.event", {
      id: newId("evt"),
      object: "v2.core.event",
      type,
      created: new Date().toISOString(),
      livemode: false,
      related_object: related,
      reason: null,
      data: data as Record<string, unknown>,
    })
    this.deliveries.queue(event.id, type, "thin")
  }

  /** Marks the state as changed; it reaches the file within a tenth of a second. */
  changed(): void {
    if (!this.options.stateFile || this.saving) return
    this.saving = setTimeout(() => this.save(), 100)
  }

  save(): void {
    clearTimeout(this.saving)
    this.saving = undefined
    if (this.options.stateFile) saveState(this.options.stateFile, this.state)
  }
}

/** The id behind a field that may hold an object or its id. */
export function idOf(value: string | { id: string } | null | undefined): string | null {
  return typeof value === "string" ? value : (value?.id ?? null)
}

import { LRUCache } from "lru-cache"
import { type AccountStatus, type KeyMode, type Listener, listen, statement } from "@/db"
import { digestsOf, isWellFormed } from "./secret"

/** What a key or a widget may do, as the database says it. */
export interface Access {
  readonly key_id: string
  readonly account_id: string
  readonly kind: "server" | "browser" | "widget"
  readonly mode: KeyMode
  readonly scopes: readonly string[]
  readonly origins: readonly string[]
  readonly cidrs: readonly string[]
  readonly expires_at: Date | null
  readonly revoked_at: Date | null
  readonly account_status: AccountStatus
  readonly plan: string
}

// A revocation is announced by the database and takes effect in milliseconds; the times only bound what a process
// that heard nothing may still believe. @source PLATFORM 2.11
const knownFor_ms = 30_000
const unknownFor_ms = 2_000

interface AccessCache {
  readonly entries: LRUCache<string, { access: Access | undefined }>
  readonly listener: Listener
  /** Grows with each announcement, so that what was read before one is not remembered after it. */
  announcements: number
}

const shared = globalThis as typeof globalThis & { tarnwrightAccess?: AccessCache }

/**
 * The access that a key gives, or undefined when it is none of ours.
 *
 * @throws DatabaseUnavailable when it is not remembered and cannot be looked up.
 */
export async function accessOfKey(secret: string): Promise<Access | undefined> {
  if (!isWellFormed(secret)) return undefined
  return remembered(secret, async () => {
    const digests = digestsOf(secret).map(({ digest }) => digest)
    const [row] = await statement<Access>("app", {
      name: "key_by_digest",
      text: "select * from key_by_digest($1)",
      values: [digests],
    })
    return row
  })
}

/** The access that a widget gives to pages of its origins, or undefined when there is no such widget. */
export async function accessOfWidget(widget_id: string): Promise<Access | undefined> {
  return remembered(widget_id, async () => {
    const [row] = await statement<Access>("app", {
      name: "widget_access",
      text: "select * from widget_access($1)",
      values: [widget_id],
    })
    return row
  })
}

/** Stops listening for changes; for scripts and tests that have to end. */
export async function forgetAccess(): Promise<void> {
  await shared.tarnwrightAccess?.listener.stop()
  shared.tarnwrightAccess = undefined
}

async function remembered(
  name: string,
  find: () => Promise<Access | undefined>,
): Promise<Access | undefined> {
  const state = cache()
  const found = state.listener.connected ? state.entries.get(name) : undefined
  if (found) return found.access
  const { announcements } = state
  const access = await find()
  if (state.announcements === announcements) {
    state.entries.set(name, { access }, { ttl: access ? knownFor_ms : unknownFor_ms })
  }
  return access
}

function cache(): AccessCache {
  shared.tarnwrightAccess ??= createCache()
  return shared.tarnwrightAccess
}

function createCache(): AccessCache {
  const entries = new LRUCache<string, { access: Access | undefined }>({ max: 50_000, ttl: knownFor_ms })
  const state: AccessCache = {
    entries,
    announcements: 0,
    listener: listen("access_changed", { connect, notification }),
  }

  function connect(): void {
    state.announcements++
    entries.clear()
  }

  function notification(payload: string): void {
    state.announcements++
    const [subject, id] = payload.split(":")
    for (const [name, { access }] of entries.entries()) {
      const changed = subject === "account" ? access?.account_id === id : access?.key_id === id
      // A key that was just made may be remembered as unknown.
      if (changed || !access) entries.delete(name)
    }
  }

  return state
}

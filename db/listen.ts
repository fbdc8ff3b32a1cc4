import pg from "pg"
import { env } from "@/lib/env"

export interface Listener {
  /** Whether notifications arrive at this moment; while they do not, nothing learned from them may be trusted. */
  readonly connected: boolean
  stop(): Promise<void>
}

/**
 * Listens to a channel on a connection of its own, for good: a lost connection is made anew after a moment.
 *
 * `onConnect` runs whenever listening begins, first and after each loss, since what was sent in between is gone.
 * Goes around a pooler: LISTEN does not work through transaction pooling.
 */
export function listen(
  channel: string,
  on: { connect(): void; notification(payload: string): void },
): Listener {
  let connected = false
  let stopped = false
  let client: pg.Client | undefined

  async function connect(): Promise<void> {
    const next = new pg.Client({ connectionString: env().DATABASE_URL, keepAlive: true })
    client = next
    next.on("notification", ({ payload }) => on.notification(payload ?? ""))
    next.on("error", () => lost(next))
    next.on("end", () => lost(next))
    try {
      await next.connect()
      await next.query(`listen ${channel}`)
      connected = true
      on.connect()
    } catch {
      lost(next)
    }
  }

  function lost(which: pg.Client): void {
    if (which !== client) return
    connected = false
    client = undefined
    which.end().catch(() => {})
    if (!stopped) setTimeout(() => stopped || connect(), 500).unref()
  }

  void connect()
  return {
    get connected() {
      return connected
    },
    async stop() {
      stopped = true
      await client?.end().catch(() => {})
    },
  }
}

import { call } from "./call"

/**
 * Where a session stands. `unopened`: nobody has changed anything yet. `resting`: the service did not answer.
 * `closed`: it answered that this widget may not be used now; a shopper is never told why.
 */
export type SessionState = "unopened" | "opening" | "open" | "resting" | "closed"

export interface Session {
  readonly state: SessionState
  /** Proof to the service that it was opened; null until then. Kept here and nowhere else. */
  readonly token: string | null
  /** Opens the session when the shopper first changes something; does nothing from then on. */
  begin(): void
  /** Tries a resting session again. */
  retry(): void
  /** The token, once an opening that this begins or waits for has brought one; null where it cannot be had. */
  opened(): Promise<string | null>
  /** Calls back on each change of state; returns how to stop. */
  subscribe(onChange: () => void): () => void
}

// One page view is one session, however often its element is moved or made anew.
const sessions = new Map<string, Session>()

/** The session of a widget on this page. `widgetUrl` is its address in the API. */
export function sessionOf(widgetUrl: string): Session {
  let session = sessions.get(widgetUrl)
  if (!session) {
    session = createSession(widgetUrl)
    sessions.set(widgetUrl, session)
  }
  return session
}

/** A session that has not been opened. */
export function createSession(widgetUrl: string): Session {
  const listeners = new Set<() => void>()
  let state: SessionState = "unopened"
  let token: string | null = null

  function become(next: SessionState): void {
    state = next
    for (const listener of listeners) listener()
  }

  function nextChange(): Promise<void> {
    return new Promise((changed) => {
      const heard = () => {
        listeners.delete(heard)
        changed()
      }
      listeners.add(heard)
    })
  }

  async function openFrom(expected: SessionState): Promise<void> {
    if (state !== expected) return
    become("opening")
    const outcome = await outcomeOf(`${widgetUrl}/sessions`)
    token = outcome.token
    become(outcome.state)
  }

  return {
    get state() {
      return state
    },
    get token() {
      return token
    },
    begin: () => void openFrom("unopened"),
    retry: () => void openFrom("resting"),
    async opened() {
      await openFrom(state === "resting" ? "resting" : "unopened")
      while (state === "opening") await nextChange()
      return token
    },
    subscribe(onChange) {
      listeners.add(onChange)
      return () => listeners.delete(onChange)
    },
  }
}

async function outcomeOf(url: string): Promise<{ state: SessionState; token: string | null }> {
  const headers = { "content-type": "application/json" }
  try {
    const answer = await call(url, { method: "POST", headers, body: "{}" })
    if (answer.ok) return { state: "open", token: (await answer.json()).token ?? null }
    return { state: answer.status >= 500 || answer.status === 429 ? "resting" : "closed", token: null }
  } catch {
    return { state: "resting", token: null }
  }
}

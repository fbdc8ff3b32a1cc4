import { call } from "./call"

/**
 * Where a session stands. `unopened`: nobody has changed anything yet. `resting`: the service did not answer.
 * `closed`: it answered that this widget may not be used now; a shopper is never told why.
 */
export type SessionState = "unopened" | "opening" | "open" | "resting" | "closed"

export interface Session {
  readonly state: SessionState
  /** Opens the session when the shopper first changes something; does nothing from then on. */
  begin(): void
  /** Tries a resting session again. */
  retry(): void
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

  function become(next: SessionState): void {
    state = next
    for (const listener of listeners) listener()
  }

  async function openFrom(expected: SessionState): Promise<void> {
    if (state !== expected) return
    become("opening")
    become(await outcomeOf(`${widgetUrl}/sessions`))
  }

  return {
    get state() {
      return state
    },
    begin: () => void openFrom("unopened"),
    retry: () => void openFrom("resting"),
    subscribe(onChange) {
      listeners.add(onChange)
      return () => listeners.delete(onChange)
    },
  }
}

async function outcomeOf(url: string): Promise<SessionState> {
  const headers = { "content-type": "application/json" }
  try {
    const answer = await call(url, { method: "POST", headers, body: "{}" })
    if (answer.ok) return "open"
    return answer.status >= 500 || answer.status === 429 ? "resting" : "closed"
  } catch {
    return "resting"
  }
}

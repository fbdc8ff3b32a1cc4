import { type Context, createContext, useContext, useEffect } from "react"
import type { Session } from "./session"

/** What a calculator is asked about and answers: figures of a tank, by their names in the API, and nothing else. */
export interface Tank {
  readonly volume_l?: number
  readonly ph?: number
  readonly kh_dkh?: number
  readonly temperature_c?: number
  readonly method?: string
  readonly level?: string
  readonly verdict?: string
}

/** One shopper's time with a widget: what its tank looks like now, and the way to ask the shop about it. */
export interface Visit {
  readonly tank: Tank
  /** Takes note of the tank as it is now. */
  note(tank: Tank): void
  /** Shows the form that asks the shop in this place; null where the shop takes no questions. */
  readonly ask: ((place: HTMLElement) => Promise<void>) | null
}

export const VisitContext: Context<Visit | null> = createContext<Visit | null>(null)

/** Tells the visit, from within a calculator, what is being asked about. */
export function useTank(tank: Tank): void {
  const visit = useContext(VisitContext)
  const said = JSON.stringify(tank)
  useEffect(() => visit?.note(JSON.parse(said)), [visit, said])
}

/** A tank is told to the shop's statistics when nothing has changed for this long. */
const quiet_ms = 3_000

/**
 * Tells the service what a visit was about: once a shopper who changed something has come to rest. Returns what takes
 * note of a tank. Whatever becomes of it, nobody notices.
 */
export function tellerOf(widgetUrl: string, session: Session, ending: AbortSignal): (tank: Tank) => void {
  let timer: ReturnType<typeof setTimeout> | undefined
  let told = ""
  ending.addEventListener("abort", () => clearTimeout(timer))

  async function tell(tank: Tank): Promise<void> {
    const { token } = session
    const said = JSON.stringify(tank)
    if (!token || said === told) return
    told = said
    await fetch(`${widgetUrl}/events`, {
      method: "POST",
      headers: { "content-type": "application/json" },
      body: JSON.stringify({ session_token: token, tank }),
      credentials: "omit",
      keepalive: true,
    }).catch(() => {})
  }

  return (tank) => {
    clearTimeout(timer)
    if (session.state !== "unopened") timer = setTimeout(() => void tell(tank), quiet_ms)
  }
}

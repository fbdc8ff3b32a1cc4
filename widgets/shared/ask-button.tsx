import { useContext, useId, useRef, useState } from "react"
import type { SharedMessages } from "./messages/shared-messages"
import { VisitContext } from "./visit"

/** Opens the form that asks the shop. It is fetched when somebody wants it, and keeps what was typed when closed. */
export function AskButton({ messages }: { readonly messages: SharedMessages }) {
  const visit = useContext(VisitContext)
  const id = useId()
  const place = useRef<HTMLDivElement>(null)
  const [state, setState] = useState<"unasked" | "fetching" | "there" | "failed">("unasked")
  const [isOpen, setOpen] = useState(false)
  const ask = visit?.ask
  if (!ask) return null

  function press(): void {
    setOpen(!isOpen || state === "failed")
    if (!ask || !place.current || state === "there" || state === "fetching") return
    setState("fetching")
    ask(place.current).then(
      () => setState("there"),
      () => setState("failed"),
    )
  }

  return (
    <div className="ask" part="ask">
      <button
        className="button"
        part="button"
        type="button"
        aria-expanded={isOpen}
        aria-controls={`${id}place`}
        aria-busy={state === "fetching"}
        onClick={press}
      >
        {messages.ask}
      </button>
      <div id={`${id}place`} ref={place} hidden={!isOpen} />
      {state === "failed" && (
        <p className="problem" role="alert">
          {messages.askFailed}
        </p>
      )}
    </div>
  )
}

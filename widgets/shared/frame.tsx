import { type ReactNode, useId, useSyncExternalStore } from "react"
import { AskButton } from "./ask-button"
import type { Locale } from "./locale"
import type { SharedMessages } from "./messages/shared-messages"
import type { Session, SessionState } from "./session"
import type { ShownWidget } from "./shown-widget"

interface FrameProps {
  readonly title: string
  readonly locale: Locale
  readonly messages: SharedMessages
  readonly shown: ShownWidget
  readonly session: Session
  readonly children: ReactNode
}

/** What surrounds every calculator: its title, what to say when it rests, the shop's link, our credit line. */
export function Frame({ title, locale, messages, shown, session, children }: FrameProps) {
  const id = useId()
  const state = useSessionState(session)
  const { link, theme } = shown.settings ?? {}
  return (
    // Focusable, but not by Tab: a click on the answer would else go to the first field and open a phone's keyboard.
    <section
      className="widget"
      part="widget"
      data-theme={theme}
      lang={locale.tag}
      aria-labelledby={id}
      tabIndex={-1}
    >
      <header className="header" part="header">
        <h2 className="title" part="title" id={id}>
          {title}
        </h2>
      </header>
      {(state === "resting" || state === "closed") && (
        <div className="notice" part="notice" role="alert">
          <p>{messages[state]}</p>
          {state === "resting" && (
            <button className="button" part="button" type="button" onClick={() => session.retry()}>
              {messages.tryAgain}
            </button>
          )}
          <slot />
        </div>
      )}
      {children}
      <AskButton messages={messages} />
      {(link || shown.credit_line) && (
        <footer className="footer" part="footer">
          {link && (
            <a className="link" part="link" href={link.url} target="_top">
              {link.label}
            </a>
          )}
          {shown.credit_line && <span className="credit">{messages.credit}</span>}
        </footer>
      )}
    </section>
  )
}

/** Where the session stands, now and after each change. */
export function useSessionState(session: Session): SessionState {
  return useSyncExternalStore(session.subscribe, () => session.state)
}

import type { ComponentType } from "react"
import { createRoot } from "react-dom/client"
import type { Ask } from "@/widgets/ask/ask"
import { chooseLocale, type Language, type Locale } from "./locale"
import { type Session, sessionOf } from "./session"
import type { ShownWidget } from "./shown-widget"
import { type Tank, tellerOf, type Visit, VisitContext } from "./visit"
import css from "./widget.css?text"

/** Where a part of the widgets is, below the service's origin, and its subresource integrity. */
export type Address = readonly [path: string, integrity: string]

/** Brings a part, verified by its integrity before a line of it runs. */
export type Load = (address: Address) => Promise<Part>

/** A calculator or the frame has `mount`, the part that asks the shop `ask`, a catalogue of one language `messages`. */
export interface Part {
  readonly mount: Mount
  readonly ask: Ask
  readonly messages: unknown
}

/** Shows something in an element, until the signal says that it is over. */
export type Mount = (host: HTMLElement, mounting: Mounting) => Promise<void>

/** What the loader hands over with an element. */
export interface Mounting {
  readonly shown: ShownWidget
  /** The widget's address in the API. */
  readonly widgetUrl: string
  readonly load: Load
  /** Aborted when the element has gone or is to show something else; perhaps before anything was shown. */
  readonly ending: AbortSignal
}

/** What every calculator is given. */
export interface CalculatorProps<Messages> {
  readonly shown: ShownWidget
  readonly session: Session
  readonly locale: Locale
  readonly messages: Messages
}

/** The catalogues of the calculator that is being built, put in by the build. */
declare const CATALOGUES: Readonly<Record<Language, Address>>
/** Where the part that asks the shop is. */
declare const ASK: Address

/** How a calculator is shown in an element's shadow tree. */
export function mountOf<Messages>(Calculator: ComponentType<CalculatorProps<Messages>>): Mount {
  return async (host, mounting) => {
    const { shown, widgetUrl, load, ending } = mounting
    const locale = localeOf(host, shown)
    const { messages } = await load(CATALOGUES[locale.language])
    if (ending.aborted) return
    const shadow = host.shadowRoot ?? host.attachShadow({ mode: "open", delegatesFocus: true })
    const sheet = new CSSStyleSheet()
    sheet.replaceSync(css)
    shadow.adoptedStyleSheets = [sheet]
    const session = sessionOf(widgetUrl)
    const root = createRoot(shadow)
    root.render(
      <VisitContext.Provider value={visitOf(mounting, session, locale)}>
        <Calculator
          shown={themed(host, shown)}
          session={session}
          locale={locale}
          messages={messages as Messages}
        />
      </VisitContext.Provider>,
    )
    ending.addEventListener("abort", () => root.unmount())
  }
}

function visitOf({ shown, widgetUrl, load, ending }: Mounting, session: Session, locale: Locale): Visit {
  const { enquiries, statistics } = shown.settings ?? {}
  const tell = statistics === false ? undefined : tellerOf(widgetUrl, session, ending)
  let tank: Tank = {}
  return {
    get tank() {
      return tank
    },
    note(noted) {
      tank = noted
      tell?.(noted)
    },
    ask: enquiries
      ? async (place) => {
          const { ask } = await load(ASK)
          const privacyUrl = enquiries.privacy_url
          await ask(place, { widgetUrl, session, locale, privacyUrl, load, tank: () => tank, ending })
        }
      : null,
  }
}

function themed(host: HTMLElement, shown: ShownWidget): ShownWidget {
  const theme = host.getAttribute("theme") ?? shown.settings?.theme ?? "page"
  return { ...shown, settings: { ...shown.settings, theme } }
}

/** The element's own language before the widget's, the widget's before the page's, the page's before the browser's. */
function localeOf(host: HTMLElement, { settings }: ShownWidget): Locale {
  const chosen = settings?.language === "page" ? null : settings?.language
  const page = host.parentElement?.closest("[lang]")?.getAttribute("lang")
  return chooseLocale([host.getAttribute("lang"), chosen, page, ...navigator.languages])
}

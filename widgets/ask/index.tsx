import { createRoot } from "react-dom/client"
import type { Language } from "@/widgets/shared/locale"
import type { Address } from "@/widgets/shared/mount"
import type { Ask } from "./ask"
import css from "./ask.css?text"
import { AskForm } from "./form"
import type { AskMessages } from "./messages/ask-messages"
import { readConsent } from "./service"

/** The catalogues of this part, put in by the build. */
declare const CATALOGUES: Readonly<Record<Language, Address>>

/** The part of a widget by which a shopper asks the shop. It knows nothing of the calculator that it stands under. */
export const ask: Ask = async (place, asking) => {
  const [{ messages }, consent] = await Promise.all([
    asking.load(CATALOGUES[asking.locale.language]),
    readConsent(asking),
  ])
  if (asking.ending.aborted) return
  const sheet = new CSSStyleSheet()
  sheet.replaceSync(css)
  const shadow = place.getRootNode() as ShadowRoot
  shadow.adoptedStyleSheets = [...shadow.adoptedStyleSheets, sheet]
  const root = createRoot(place)
  root.render(<AskForm asking={asking} messages={messages as AskMessages} firstConsent={consent} />)
  asking.ending.addEventListener("abort", () => root.unmount())
}

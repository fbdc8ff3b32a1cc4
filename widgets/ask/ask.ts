import type { Locale } from "@/widgets/shared/locale"
import type { Load } from "@/widgets/shared/mount"
import type { Session } from "@/widgets/shared/session"
import type { Tank } from "@/widgets/shared/visit"

/** What the form needs of the widget that it stands in. */
export interface Asking {
  readonly widgetUrl: string
  readonly session: Session
  readonly locale: Locale
  /** Page on which the shop says how it treats personal data. */
  readonly privacyUrl: string
  readonly load: Load
  /** The tank as it is when the question is sent. */
  tank(): Tank
  readonly ending: AbortSignal
}

/** Shows the form in an element of a shadow tree. Rejects when it cannot be brought. */
export type Ask = (place: HTMLElement, asking: Asking) => Promise<void>

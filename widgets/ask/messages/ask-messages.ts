import type { Problem } from "../state"

/** What the part that asks the shop says. */
export interface AskMessages {
  readonly title: (shop: string) => string
  readonly lead: string
  readonly name: string
  readonly optional: string
  readonly email: string
  readonly message: string
  readonly privacy: (shop: string) => string
  readonly newTab: string
  readonly send: string
  readonly sending: string
  readonly sent: (shop: string, email: string) => string
  readonly failed: string
  readonly problems: Readonly<Record<Problem, string>>
}

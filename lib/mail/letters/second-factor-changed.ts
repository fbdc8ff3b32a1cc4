import type { Letter } from "../compose"

export interface SecondFactorChangedData {
  name: string
  what: "set_up" | "removed" | "codes_renewed" | "recovery_code_used"
  /** Recovery codes that were not used yet. */
  codes_left: number
  reset_url: string
}

export function secondFactorChanged({ name, what, codes_left, reset_url }: SecondFactorChangedData): Letter {
  const [subject, words] = said[what](codes_left)
  return {
    subject,
    paragraphs: [`Hello ${name},`, `${words} If you did this, all is well.`],
    action: { label: "It was not me: set a new password", url: reset_url },
    reason: "We always tell the owner of an address when something about its sign-in changes.",
  }
}

const said: Record<SecondFactorChangedData["what"], (left: number) => [subject: string, words: string]> = {
  set_up: () => [
    "Your Tarnwright sign-in has a second factor",
    "a second factor was just set up for this sign-in, and every other session was ended.",
  ],
  removed: () => [
    "The second factor of your Tarnwright sign-in was removed",
    "the second factor of this sign-in was just removed, and every other session was ended. Its password alone opens it now.",
  ],
  codes_renewed: () => [
    "Your Tarnwright recovery codes were made anew",
    "new recovery codes were just made for this sign-in. The old ones no longer work.",
  ],
  recovery_code_used: (left) => [
    "A recovery code of your Tarnwright sign-in was used",
    `a recovery code of this sign-in was just used in place of a code of the app. ${left === 1 ? "One is" : `${left} are`} left.`,
  ],
}

/** What next-auth answers to a try to sign in; undefined when it could not be reached. */
export type Outcome = { ok: boolean; error?: string | null } | undefined

/** Why nobody was signed in, in words. */
export function wordsFor(outcome: Outcome): string {
  if (!outcome?.error) return "We could not be reached. Check your connection and try again."
  if (outcome.error === "CredentialsSignin") return "This address and this password do not belong together."
  return outcome.error
}

import { call } from "@/widgets/shared/call"
import type { Asking } from "./ask"
import { type Problems, problemsIn, type Values } from "./state"

/** The words that the shopper agrees to. */
export interface Consent {
  readonly version: string
  readonly wording: string
  readonly shop_name: string
}

/** Fetches the words in the shopper's language. */
export async function readConsent({ widgetUrl, locale }: Asking): Promise<Consent> {
  const answer = await call(`${widgetUrl}/consent?language=${locale.language}`)
  if (!answer.ok) throw new Error(`consent: ${answer.status}`)
  return answer.json()
}

/** What became of a question: it is with the shop, something in it has to be mended, or it could not be sent. */
export type Outcome = "sent" | "failed" | Problems

/** Sends a question. `once` is the same for the same question, so that one sent twice arrives once. */
export async function sendQuestion(
  { widgetUrl, session, locale, tank }: Asking,
  values: Values,
  consent: Consent,
  once: string,
): Promise<Outcome> {
  try {
    const session_token = await session.opened()
    if (!session_token) return "failed"
    const name = values.name.trim()
    const answer = await call(`${widgetUrl}/enquiries`, {
      method: "POST",
      headers: { "content-type": "application/json", "idempotency-key": once },
      body: JSON.stringify({
        session_token,
        language: locale.language,
        ...(name && { name }),
        email: values.email.trim(),
        message: values.message.trim(),
        tank: tank(),
        consent: { given: values.agreed, version: consent.version },
      }),
    })
    if (answer.ok) return "sent"
    if (answer.status !== 422) return "failed"
    const { errors = [] } = (await answer.json()) as { errors?: { pointer: string }[] }
    return problemsIn(errors) ?? "failed"
  } catch {
    return "failed"
  }
}

/** A key for one question. Not `randomUUID`: a page without TLS has none. */
export function newKey(): string {
  return [...crypto.getRandomValues(new Uint32Array(4))].map((part) => part.toString(36)).join("")
}

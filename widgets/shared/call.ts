const timeout_ms = 4_000
const attempts = 3
/** A service that asks for a longer rest than a shopper would wait is not asked again. */
const longestRest_ms = 8_000

/**
 * A request to our service: 4 s for an answer, and two more tries with jitter when it is resting or out of reach.
 * No cookie goes with it. Rejects when no try brought an answer.
 */
export async function call(url: string, init: RequestInit = {}): Promise<Response> {
  for (let attempt = 1; ; attempt++) {
    const answer = await once(url, init)
    const isLast = attempt === attempts
    if (answer && (isLast || ![429, 503].includes(answer.status))) return answer
    const rest_ms = restBefore(attempt, answer?.headers.get("retry-after"))
    if (isLast || rest_ms > longestRest_ms) throw new Error("no answer")
    await new Promise((resolve) => setTimeout(resolve, rest_ms))
  }
}

function once(url: string, init: RequestInit): Promise<Response | undefined> {
  return fetch(url, { credentials: "omit", ...init, signal: AbortSignal.timeout(timeout_ms) }).catch(
    () => undefined,
  )
}

function restBefore(attempt: number, retryAfter: string | null | undefined): number {
  const asked_ms = Number(retryAfter ?? 0) * 1000 || 0
  return Math.max(asked_ms, 200 * 2 ** attempt) * (1 + Math.random() / 2)
}

import { randomUUID } from "node:crypto"
import { type JWK, type JWTPayload, jwtVerify, SignJWT } from "jose"
import { env } from "@/lib/env"
import { TarnwrightError } from "@/lib/errors"

/** How long a session token is good for. @source PLATFORM 4.12 */
export const SESSION_SECONDS = 600

const algorithm = "Ed25519"
const type = "wst+jwt"
const audience = "widget-api"

/** What a session token says: which widget of which account was opened by a page of which origin. */
export interface SessionClaims {
  readonly widget_id: string
  readonly account_id: string
  readonly origin: string
}

/** The claims with the session's own id, a random one that leads to nobody. */
export interface Session extends SessionClaims {
  readonly session_id: string
}

/** A token that says so for {@link SESSION_SECONDS} seconds. */
export async function signSessionToken(claims: SessionClaims, now: Date): Promise<string> {
  const { secret } = keys()
  const issuedAt = Math.floor(now.getTime() / 1000)
  return new SignJWT({ org: claims.account_id, origin: claims.origin, scope: "widget" })
    .setProtectedHeader({ alg: algorithm, typ: type, kid: secret.kid })
    .setIssuer(env().PUBLIC_URL)
    .setAudience(audience)
    .setSubject(claims.widget_id)
    .setJti(randomUUID())
    .setIssuedAt(issuedAt)
    .setExpirationTime(issuedAt + SESSION_SECONDS)
    .sign(secret)
}

/**
 * What a token says, if it is ours, of this kind, in time, and sent from the origin that it was made for.
 *
 * `late_s`: seconds for which it is taken beyond its time, where a shopper's own pace decides and nothing is paid for.
 *
 * @throws TarnwrightError `origin_not_allowed` for any other token: it tells nobody what was wrong with it.
 */
export async function verifySessionToken(
  token: string,
  origin: string,
  now: Date,
  late_s = 0,
): Promise<Session> {
  const payload = await verified(token, now, late_s)
  const { sub, org, jti } = payload ?? {}
  if (payload?.origin !== origin || typeof sub !== "string" || typeof org !== "string" || !jti) {
    throw new TarnwrightError("origin_not_allowed", "The widget's session is not valid here. Open a new one.")
  }
  return { widget_id: sub, account_id: org, origin, session_id: jti }
}

function verified(token: string, now: Date, late_s: number): Promise<JWTPayload | undefined> {
  const rules = {
    algorithms: [algorithm],
    issuer: env().PUBLIC_URL,
    audience,
    typ: type,
    clockTolerance: 5 + late_s,
  }
  return jwtVerify(token, keys().open, { ...rules, currentDate: now }).then(
    ({ payload }) => payload,
    () => undefined,
  )
}

let parsed: { readonly secret: JWK & { kid: string }; readonly open: JWK } | undefined

function keys() {
  if (!parsed) {
    const { d, kid, kty, crv, x } = JSON.parse(env().WIDGET_SIGNING_KEY)
    // jose keeps the imported key by the object's identity, so these two are made once.
    parsed = { secret: { kty, crv, x, d, kid }, open: { kty, crv, x } }
  }
  return parsed
}

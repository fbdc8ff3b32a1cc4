import { generateKeyPairSync } from "node:crypto"
import { decodeProtectedHeader, exportJWK, generateKeyPair, importJWK, jwtVerify, SignJWT } from "jose"
import { beforeAll, describe, expect, it } from "vitest"
import { signSessionToken, verifySessionToken } from "@/lib/widgets/session-token"
import { practiceSettings } from "../support/settings"

const now = new Date("2026-12-01T10:00:00Z")
const claims = { widget_id: "wdgt_1", account_id: "acct_1", origin: "https://shop.example" }
const jwk = { ...generateKeyPairSync("ed25519").privateKey.export({ format: "jwk" }), kid: "k1" }

beforeAll(() => {
  const own = { PUBLIC_URL: "https://app.example", WIDGET_SIGNING_KEY: JSON.stringify(jwk) }
  Object.assign(process.env, practiceSettings(), own)
})

const later = (seconds: number) => new Date(now.getTime() + seconds * 1000)
const uuid = expect.stringMatching(/^[0-9a-f-]{36}$/)
const refused = { code: "origin_not_allowed" }

describe("a widget's session token", () => {
  it("names the widget, the account and the page's origin", async () => {
    const token = await signSessionToken(claims, now)
    expect(await verifySessionToken(token, claims.origin, later(60))).toEqual({ ...claims, session_id: uuid })
  })

  it("is a JWT of its own type, signed with Ed25519, for one audience, that another library can verify", async () => {
    const token = await signSessionToken(claims, now)
    expect(decodeProtectedHeader(token)).toEqual({ alg: "Ed25519", typ: "wst+jwt", kid: "k1" })
    const { d: _, ...open } = jwk
    const { payload } = await jwtVerify(token, await importJWK(open, "Ed25519"), { currentDate: now })
    expect(payload).toMatchObject({ iss: "https://app.example", aud: "widget-api", scope: "widget" })
    expect(payload.exp! - payload.iat!).toBe(600)
  })

  it("is different each time", async () => {
    expect(await signSessionToken(claims, now)).not.toBe(await signSessionToken(claims, now))
  })

  it("ends after ten minutes, with five seconds for clocks that differ", async () => {
    const token = await signSessionToken(claims, now)
    await expect(verifySessionToken(token, claims.origin, later(604))).resolves.toMatchObject(claims)
    await expect(verifySessionToken(token, claims.origin, later(606))).rejects.toMatchObject(refused)
  })

  it("is taken later where its shopper's pace decides, and no longer than that", async () => {
    const token = await signSessionToken(claims, now)
    await expect(verifySessionToken(token, claims.origin, later(4_000), 3_600)).resolves.toMatchObject(claims)
    await expect(verifySessionToken(token, claims.origin, later(4_300), 3_600)).rejects.toMatchObject(refused)
  })

  it("is refused from another origin", async () => {
    const token = await signSessionToken(claims, now)
    await expect(verifySessionToken(token, "https://other.example", now)).rejects.toMatchObject(refused)
  })

  it.each([
    ["another type", { typ: "JWT" }, {}],
    ["another audience", {}, { aud: "admin" }],
    ["another issuer", {}, { iss: "https://elsewhere.example" }],
  ])("is refused with %s, though our key signed it", async (_, header, payload) => {
    const token = await new SignJWT({
      org: "acct_1",
      origin: claims.origin,
      iss: "https://app.example",
      aud: "widget-api",
      sub: "wdgt_1",
      exp: Math.floor(now.getTime() / 1000) + 60,
      ...payload,
    })
      .setProtectedHeader({ alg: "Ed25519", typ: "wst+jwt", ...header })
      .sign(await importJWK(jwk, "Ed25519"))
    await expect(verifySessionToken(token, claims.origin, now)).rejects.toMatchObject(refused)
  })

  it("is refused when another key signed it", async () => {
    const { privateKey } = await generateKeyPair("Ed25519", { extractable: true })
    const token = await new SignJWT({ org: "acct_1", origin: claims.origin })
      .setProtectedHeader({ alg: "Ed25519", typ: "wst+jwt" })
      .setIssuer("https://app.example")
      .setAudience("widget-api")
      .setSubject("wdgt_1")
      .setExpirationTime(later(60))
      .sign(await importJWK(await exportJWK(privateKey), "Ed25519"))
    await expect(verifySessionToken(token, claims.origin, now)).rejects.toMatchObject(refused)
  })

  it("is refused when it is no token at all", async () => {
    await expect(verifySessionToken("", claims.origin, now)).rejects.toMatchObject(refused)
    await expect(verifySessionToken("a.b.c", claims.origin, now)).rejects.toMatchObject(refused)
  })
})

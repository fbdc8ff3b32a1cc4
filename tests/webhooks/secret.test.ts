import { beforeAll, describe, expect, it } from "vitest"
import { seal, unseal } from "@/lib/seal"
import { webhookEvents } from "@/lib/webhooks"
import { payloadOf } from "@/lib/webhooks/publish"
import { newSecret } from "@/lib/webhooks/secret"
import { practiceSettings } from "../support/settings"

beforeAll(() => {
  Object.assign(process.env, practiceSettings())
})

describe("a signing secret", () => {
  it("is whsec_ and 32 random bytes, a new one each time", () => {
    const secrets = Array.from({ length: 50 }, newSecret)
    for (const secret of secrets) {
      expect(secret).toMatch(/^whsec_[A-Za-z0-9+/]{43}=$/)
      expect(Buffer.from(secret.slice(6), "base64")).toHaveLength(32)
    }
    expect(new Set(secrets).size).toBe(50)
  })
})

describe("a sealed text", () => {
  it("opens at its own place alone, and only as it was", () => {
    const sealed = seal("whsec_abc", "webhook_endpoint:hook_1")
    expect(unseal(sealed, "webhook_endpoint:hook_1")).toBe("whsec_abc")
    expect(() => unseal(sealed, "webhook_endpoint:hook_2")).toThrow()
    for (const index of sealed.keys()) {
      const changed = Buffer.from(sealed)
      changed[index]! ^= 1
      expect(() => unseal(changed, "webhook_endpoint:hook_1"), `byte ${index}`).toThrow()
    }
  })

  it("does not show its text, and looks different each time", () => {
    const [one, other] = [seal("whsec_abc", "a"), seal("whsec_abc", "a")]
    expect(one.includes("whsec_abc")).toBe(false)
    expect(one.equals(other)).toBe(false)
  })
})

describe("the body of an event", () => {
  it.each(Object.entries(webhookEvents))("%s: its example fits its own schema", (_, { data, example }) => {
    expect(data.strict().parse(example)).toEqual(example)
  })

  it("has type, timestamp and data", () => {
    const at = new Date("2026-12-01T09:30:00Z")
    const { example } = webhookEvents["enquiry.created"]
    expect(JSON.parse(payloadOf("enquiry.created", example, at))).toEqual({
      type: "enquiry.created",
      timestamp: "2026-12-01T09:30:00.000Z",
      data: example,
    })
  })

  it("is refused at 20 kB", () => {
    const report = { ...webhookEvents["report.created"].example }
    expect(() => payloadOf("report.created", { ...report, title: "ü".repeat(10_000) }, new Date())).toThrow(
      /bytes/,
    )
  })
})

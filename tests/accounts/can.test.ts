import { describe, expect, it } from "vitest"
import { authorize, can, type Right } from "@/lib/accounts/can"
import type { Actor } from "@/lib/context"

const as = (role: "owner" | "developer" | "merchandiser" | "viewer"): Actor => ({
  kind: "user",
  id: "user_me",
  role,
})
const admin: Actor = { kind: "admin", id: "user_admin" }

// The table of PLATFORM 5.9, written down a second time.
const expected: readonly [
  Right,
  owner: boolean,
  developer: boolean,
  merchandiser: boolean,
  viewer: boolean,
  admin: boolean,
][] = [
  ["account.manage", true, false, false, false, false],
  ["team.manage", true, false, false, false, false],
  ["billing.manage", true, false, false, false, false],
  ["billing.read", true, false, false, true, true],
  ["key.create", true, true, false, false, false],
  ["key.rotate", true, true, false, false, false],
  ["key.revoke", true, true, false, false, true],
  ["widget.manage", true, true, true, false, false],
  ["usage.read", true, true, false, true, true],
  ["platform.manage", false, false, false, false, true],
]

describe("who may do what", () => {
  it.each(expected)("%s", (right, owner, developer, merchandiser, viewer, byAdmin) => {
    expect(can(as("owner"), right)).toBe(owner)
    expect(can(as("developer"), right)).toBe(developer)
    expect(can(as("merchandiser"), right)).toBe(merchandiser)
    expect(can(as("viewer"), right)).toBe(viewer)
    expect(can(admin, right)).toBe(byAdmin)
  })

  it("lets a developer read of the audit trail what they did themselves, and no more", () => {
    expect(can(as("developer"), "audit.read", { by: "user_me" })).toBe(true)
    expect(can(as("developer"), "audit.read", { by: "user_other" })).toBe(false)
    expect(can(as("owner"), "audit.read", { by: "user_other" })).toBe(true)
  })

  it("gives a key no right of a person", () => {
    expect(can({ kind: "key", id: "key_1" }, "account.read")).toBe(false)
  })

  it("refuses with the role in its words", () => {
    expect(() => authorize(as("viewer"), "key.create")).toThrowError(
      expect.objectContaining({ code: "forbidden", detail: expect.stringContaining("viewer") }),
    )
    expect(() => authorize(as("owner"), "key.create")).not.toThrow()
  })
})

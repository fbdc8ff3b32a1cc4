import { execFile } from "node:child_process"
import { promisify } from "node:util"
import request from "supertest"
import { describe, expect, it } from "vitest"
import { stack } from "../support/stack"

const run = promisify(execFile)

/** What `npm run keys -- …` prints, with the settings of the running stack. */
async function keys(...args: string[]): Promise<string> {
  const env = { ...process.env, ...stack().settings }
  const { stdout } = await run("npm", ["run", "-s", "keys", "--", ...args], { env })
  return stdout.trim()
}

describe("npm run keys", () => {
  it("makes a key that works, lists it without its secret, and revokes it within 2 s", async () => {
    const secret = await keys(
      "create",
      "--account",
      "fernhollow",
      "--mode",
      "live",
      "--scopes",
      "calculate,usage",
    )
    const call = () =>
      request(stack().appUrl)
        .post("/api/v1/carbonate/co2")
        .set("authorization", `Bearer ${secret}`)
        .send({ ph: 6.8, kh_dkh: 4 })
    await call().expect(200)

    const listed = await keys("list", "--account", "fernhollow", "--json")
    const found = JSON.parse(listed).find(({ last4 }: { last4: string }) => last4 === secret.slice(-4))
    expect(found).toMatchObject({ kind: "server", mode: "live", scopes: ["calculate", "usage"] })
    expect(listed).not.toContain(secret)

    await keys("revoke", found.id)
    const revokedAt = Date.now()
    let status = 200
    while (status !== 401 && Date.now() - revokedAt < 2_000) status = (await call()).status
    expect(status).toBe(401)
  })

  it("says what is wrong and how to mend it", async () => {
    await expect(keys("create", "--account", "nobody")).rejects.toThrow("There is no account with the slug")
    await expect(keys("create", "--account", "fernhollow", "--scopes", "everything")).rejects.toThrow(
      "The scopes are",
    )
    await expect(keys("revoke", "key_none")).rejects.toThrow("There is no key")
  })
})

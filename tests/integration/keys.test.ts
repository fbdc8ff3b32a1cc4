import { createServer, type Server } from "node:http"
import type { AddressInfo } from "node:net"
import pg from "pg"
import request from "supertest"
import { afterAll, beforeAll, describe, expect, it } from "vitest"
import { registry } from "@/app/api/v1/registry"
import { closePools, withTenant } from "@/db"
import { nodeMount } from "@/lib/api/node-mount"
import { createServe } from "@/lib/api/serve"
import { forgetAccess, listKeys, revokeKey, rotateKey } from "@/lib/keys"
import { createTestAccount } from "../support/account"
import { stack, takeSettings } from "../support/stack"

const body = { ph: 6.8, kh_dkh: 4 }
let second: Server
let secondUrl: string

// A second instance, in this process, beside the one of the stack: what one learns the other must learn.
beforeAll(async () => {
  takeSettings()
  const serve = createServe({ registry, publicUrl: stack().settings.PUBLIC_URL ?? "" })
  second = createServer(nodeMount(serve))
  await new Promise<void>((resolve) => second.listen(0, "127.0.0.1", resolve))
  secondUrl = `http://127.0.0.1:${(second.address() as AddressInfo).port}`
})

afterAll(async () => {
  second.close()
  await forgetAccess()
  await closePools()
})

function post(secret: string, url = stack().appUrl) {
  return request(url).post("/api/v1/carbonate/co2").set("authorization", `Bearer ${secret}`).send(body)
}

/** Milliseconds until both instances refuse the key. */
async function refusedEverywhereAfter(secret: string): Promise<number> {
  const start = Date.now()
  for (;;) {
    const answers = await Promise.all([post(secret), post(secret, secondUrl)])
    if (answers.every(({ status }) => status === 401)) return Date.now() - start
    if (Date.now() - start > 10_000) throw new Error("A revoked key still works after 10 s")
    await new Promise((resolve) => setTimeout(resolve, 20))
  }
}

describe("a revoked key", () => {
  it("is refused by every instance within 2 s, though both had it in memory", async () => {
    const account = await createTestAccount()
    const { secret, key } = await account.key()
    await post(secret).expect(200)
    await post(secret, secondUrl).expect(200)
    await revokeKey({ ctx: account.ctx, input: { key_id: key.id, reason: "test" } })
    expect(await refusedEverywhereAfter(secret)).toBeLessThan(2_000)
  })

  it("is refused within 5 s also when every listening connection was cut before", async () => {
    const account = await createTestAccount()
    const { secret, key } = await account.key()
    await post(secret).expect(200)
    await post(secret, secondUrl).expect(200)
    const superuser = new pg.Client({ connectionString: stack().databaseUrls.superuser })
    await superuser.connect()
    const { rowCount } = await superuser.query(
      "select pg_terminate_backend(pid) from pg_stat_activity where query ilike 'listen access_changed%'",
    )
    await superuser.end()
    expect(rowCount).toBeGreaterThanOrEqual(2)
    await revokeKey({ ctx: account.ctx, input: { key_id: key.id } })
    expect(await refusedEverywhereAfter(secret)).toBeLessThan(5_000)
  })

  it("is refused also when it was revoked straight in the database", async () => {
    const account = await createTestAccount()
    const { secret, key } = await account.key()
    await post(secret).expect(200)
    await withTenant(account.ctx.account_id, (trx) =>
      trx.updateTable("api_key").set({ revoked_at: new Date() }).where("id", "=", key.id).execute(),
    )
    expect(await refusedEverywhereAfter(secret)).toBeLessThan(2_000)
  })
})

describe("a key", () => {
  it("expires", async () => {
    const account = await createTestAccount()
    const { secret } = await account.key({ expires_at: new Date(Date.now() + 700) })
    await post(secret).expect(200)
    await new Promise((resolve) => setTimeout(resolve, 900))
    const { body: problem } = await post(secret).expect(401)
    expect(problem.code).toBe("key_expired")
  })

  it("is rotated with an overlap in which both work", async () => {
    const account = await createTestAccount()
    const old = await account.key({ scopes: ["calculate", "usage"] })
    const made = await rotateKey({ ctx: account.ctx, input: { key_id: old.key.id, overlap_h: 1 } })
    await post(old.secret).expect(200)
    await post(made.secret).expect(200)
    expect(made.key.scopes).toEqual(["calculate", "usage"])
    const rotated = (await listKeys({ ctx: account.ctx })).find(({ id }) => id === old.key.id)
    expect(rotated?.successor_id).toBe(made.key.id)
    expect(rotated?.expires_at?.getTime()).toBe(account.ctx.now.getTime() + 3_600_000)
    await expect(
      rotateKey({ ctx: account.ctx, input: { key_id: old.key.id, overlap_h: 1 } }),
    ).rejects.toThrow("conflict")
  })

  it("works only from the addresses on its list, where it has one", async () => {
    const account = await createTestAccount()
    const here = await account.key({ cidrs: ["127.0.0.0/8", "2001:db8::/32"] })
    const elsewhere = await account.key({ cidrs: ["192.0.2.0/24"] })
    await post(here.secret).expect(200)
    const { body: problem } = await post(elsewhere.secret).expect(403)
    expect(problem.code).toBe("address_not_allowed")
  })

  it("is refused where it stands in the address", async () => {
    const account = await createTestAccount()
    const { secret } = await account.key()
    const response = await request(stack().appUrl).post(`/api/v1/carbonate/co2?key=${secret}`).send(body)
    expect(response.status).toBe(400)
    expect(response.body.code).toBe("key_in_url")
    expect(JSON.stringify(response.body)).not.toContain(secret)
  })

  it("of a suspended account is refused within 2 s", async () => {
    const account = await createTestAccount()
    const { secret } = await account.key()
    await post(secret).expect(200)
    await withTenant(account.ctx.account_id, (trx) =>
      trx
        .updateTable("account")
        .set({ status: "suspended" })
        .where("id", "=", account.ctx.account_id)
        .execute(),
    )
    await new Promise((resolve) => setTimeout(resolve, 500))
    const { body: problem } = await post(secret).expect(403)
    expect(problem.code).toBe("account_suspended")
  })

  it("is nowhere in the database as it is", async () => {
    const account = await createTestAccount()
    const { secret, key } = await account.key()
    const superuser = new pg.Client({ connectionString: stack().databaseUrls.superuser })
    await superuser.connect()
    const { rows } = await superuser.query(
      "select row_to_json(k)::text as row from api_key k where id = $1",
      [key.id],
    )
    await superuser.end()
    expect(rows).toHaveLength(1)
    expect(rows[0].row).not.toContain(secret)
    expect(rows[0].row).not.toContain(secret.slice(-12))
  })
})

describe("a browser key", () => {
  it("works on pages of its origins and is answered to those alone", async () => {
    const account = await createTestAccount()
    const { secret } = await account.key({ kind: "browser", origins: ["https://shop.example"] })
    const allowed = await post(secret).set("origin", "https://shop.example").expect(200)
    expect(allowed.headers["access-control-allow-origin"]).toBe("https://shop.example")
    expect(allowed.headers.vary).toContain("Origin")
    for (const origin of ["https://shop.example.evil.example", "http://shop.example", "null"]) {
      const refused = await post(secret).set("origin", origin).expect(403)
      expect(refused.body.code).toBe("origin_not_allowed")
      expect(refused.headers["access-control-allow-origin"]).toBeUndefined()
    }
    await post(secret).expect(403)
  })

  it("can calculate and nothing else", async () => {
    const account = await createTestAccount()
    await expect(
      account.key({ kind: "browser", origins: ["https://shop.example"], scopes: ["calculate", "usage"] }),
    ).rejects.toThrow("validation_failed")
    await expect(account.key({ kind: "browser", origins: [] })).rejects.toThrow("validation_failed")
  })
})

describe("a preflight", () => {
  it("lets a page ask for a calculation, and for nothing that needs a server key", async () => {
    const ask = (path: string) =>
      request(stack().appUrl)
        .options(`/api/v1${path}`)
        .set("origin", "https://shop.example")
        .set("access-control-request-method", "POST")
    const calculation = await ask("/carbonate/co2").expect(204)
    expect(calculation.headers["access-control-allow-origin"]).toBe("https://shop.example")
    expect(calculation.headers["access-control-allow-credentials"]).toBeUndefined()
    const usage = await request(stack().appUrl)
      .options("/api/v1/usage")
      .set("origin", "https://shop.example")
      .set("access-control-request-method", "GET")
    expect(usage.headers["access-control-allow-origin"]).toBeUndefined()
  })
})

import { afterAll, beforeAll, describe, expect, it } from "vitest"
import { closePools } from "@/db"
import { listActs } from "@/lib/audit"
import { changeItem, createItem, deleteItem, importItems, listItems } from "@/lib/catalog"
import { takeSettings } from "../support/stack"
import { createSubscriber } from "../support/subscriber"

beforeAll(() => takeSettings())
afterAll(() => closePools())

const header = "kind,name,sku,price,currency,max_flow_l_h,max_head_m"
const mixed = [
  header,
  "filter,Good one,G-1,99.00,USD,1000,1.6",
  "filter,Bad price,B-1,cheap,USD,1000,1.6",
  "toaster,Bad kind,B-2,10,USD,,",
  "reducer,Good two,G-2,49.50,USD,,",
].join("\n")

async function shop() {
  const { ctx } = await createSubscriber({ plan: "brand" })
  const all = () => listItems({ ctx, input: { limit: 5_000 } })
  const take = (csv: string, dry_run: boolean, partial = false) =>
    importItems({ ctx, input: { csv, dry_run, partial } })
  return { ctx, all, take }
}

describe("a file of parts", () => {
  it("tried first says what each good row does and names each bad cell, and takes nothing", async () => {
    const { all, take } = await shop()
    await take(`${header}\nfilter,Before,G-1,99.00,USD,900,1.5`, false)
    const { good, errors, imported } = await take(mixed, true)
    expect(imported).toBe(false)
    expect(good.map(({ row, changes }) => [row, changes])).toEqual([
      [2, true],
      [5, false],
    ])
    expect(errors.map(({ row, column, value }) => [row, column, value])).toEqual([
      [3, "price", "cheap"],
      [4, "kind", "toaster"],
    ])
    expect((await all()).map(({ name }) => name)).toEqual(["Before"])
  })

  it("is held back whole by a bad row, unless the good ones are wanted", async () => {
    const { ctx, all, take } = await shop()
    expect((await take(mixed, false)).imported).toBe(false)
    expect(await all()).toEqual([])
    expect(await take(mixed, false, true)).toMatchObject({ imported: true, created: 2, changed: 0 })
    expect((await all()).map(({ sku }) => sku).sort()).toEqual(["G-1", "G-2"])
    const [act] = await listActs({ ctx, input: { limit: 1 } })
    expect(act).toMatchObject({ action: "catalog.imported", detail: { created: 2, changed: 0 } })
  })

  it("of 5,000 rows is taken twice without a double", { timeout: 60_000 }, async () => {
    const { all, take } = await shop()
    const rows = Array.from({ length: 5_000 }, (_, at) => `reducer,Part ${at},P-${at},9,USD,,`)
    const csv = [header, ...rows].join("\n")
    expect(await take(csv, false)).toMatchObject({ created: 5_000, changed: 0 })
    expect(await take(csv, false)).toMatchObject({ created: 0, changed: 5_000 })
    expect(await all()).toHaveLength(5_000)
  })
})

describe("a part of another account", () => {
  it("is not found, as one that never was", async () => {
    const [mine, theirs] = await Promise.all([shop(), shop()])
    const { id } = await createItem({
      ctx: theirs.ctx,
      input: { kind: "reducer", name: "Theirs", attributes: {} },
    })
    for (const item_id of [id, "item_never"]) {
      const detail = { code: "not_found", detail: "There is no such item in this account." }
      await expect(changeItem({ ctx: mine.ctx, input: { item_id, name: "Mine" } })).rejects.toMatchObject(
        detail,
      )
      await expect(deleteItem({ ctx: mine.ctx, input: { item_id } })).rejects.toMatchObject(detail)
    }
    expect((await theirs.all()).map(({ name }) => name)).toEqual(["Theirs"])
  })
})

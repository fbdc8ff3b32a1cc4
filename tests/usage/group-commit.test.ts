import { describe, expect, it } from "vitest"
import { GroupCommit } from "@/lib/usage/group-commit"

describe("a group commit", () => {
  it("commits what arrives together in one flush, in the order it came", async () => {
    const flushes: number[][] = []
    const group = new GroupCommit<number, string>(async (items) => {
      flushes.push(items)
      return items.map((item) => `receipt ${item}`)
    }, 500)
    expect(await Promise.all([1, 2, 3].map((item) => group.commit(item)))).toEqual([
      "receipt 1",
      "receipt 2",
      "receipt 3",
    ])
    expect(flushes).toEqual([[1, 2, 3]])
  })

  it("gathers the next batch while one is in flight, and holds no answer back for it", async () => {
    const flushes: number[][] = []
    let land = () => {}
    const group = new GroupCommit<number, number>(async (items) => {
      flushes.push(items)
      if (flushes.length === 1) await new Promise<void>((resolve) => (land = resolve))
      return items
    }, 500)
    const first = group.commit(1)
    await new Promise((resolve) => setTimeout(resolve, 5))
    const later = [2, 3, 4].map((item) => group.commit(item))
    await new Promise((resolve) => setTimeout(resolve, 5))
    expect(flushes).toEqual([[1]])
    land()
    expect(await first).toBe(1)
    expect(await Promise.all(later)).toEqual([2, 3, 4])
    expect(flushes).toEqual([[1], [2, 3, 4]])
  })

  it("splits more than the largest batch", async () => {
    const sizes: number[] = []
    const group = new GroupCommit<number, number>(async (items) => {
      sizes.push(items.length)
      return items
    }, 4)
    await Promise.all(Array.from({ length: 10 }, (_, item) => group.commit(item)))
    expect(sizes).toEqual([4, 4, 2])
  })

  it("fails the calls of a batch that could not be written, and goes on with the next", async () => {
    let attempts = 0
    const group = new GroupCommit<number, number>(async (items) => {
      attempts++
      if (attempts === 1) throw new Error("no database")
      return items
    }, 500)
    const outcomes = await Promise.allSettled([group.commit(1), group.commit(2)])
    expect(outcomes.map(({ status }) => status)).toEqual(["rejected", "rejected"])
    expect(await group.commit(3)).toBe(3)
  })
})

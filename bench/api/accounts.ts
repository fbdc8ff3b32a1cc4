import { asWorker } from "@/db"
import { newId } from "@/lib/id"
import { createKey } from "@/lib/keys"

export interface BenchKey {
  readonly secret: string
  readonly account_id: string
  readonly key_id: string
}

/** Accounts with one live key each: enough that their rates together are above what this machine can serve. */
export async function createBenchKeys(count: number): Promise<BenchKey[]> {
  const keys: BenchKey[] = []
  for (let made = 0; made < count; made++) {
    const account_id = newId("account")
    await asWorker((trx) =>
      trx
        .insertInto("account")
        .values({
          id: account_id,
          slug: `bench-${account_id.slice(-20)}`,
          name: "A benchmark's account",
          plan: "brand",
          unit_cap: 1_000_000_000,
        })
        .execute(),
    )
    const { key, secret } = await createKey({
      ctx: { account_id, actor: { kind: "system", id: "bench" }, now: new Date() },
      input: { kind: "server", mode: "live", name: "Benchmark", scopes: ["calculate"] },
    })
    keys.push({ secret, account_id, key_id: key.id })
  }
  return keys
}

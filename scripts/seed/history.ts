import pg from "pg"
import { ENGINE_VERSION } from "@/lib/chemistry/engine-version"
import { newId } from "@/lib/id"

export interface Spender {
  account_id: string
  key_id: string
  /** Calls on an ordinary day; weekends bring two thirds of it. */
  callsPerDay: number
}

/** What a shop's site asks for, with the share of its calls and the units of one. */
const mix = [
  { operation: "carbonateCo2", share: 0.7, units: 1 },
  { operation: "carbonatePh", share: 0.2, units: 1 },
  { operation: "carbonateKh", share: 0.1, units: 1 },
]

const DAYS = 35

/**
 * Writes five weeks of live usage for each spender: ledger, hourly sums and the counter of this month, which agree.
 *
 * No role of the product may write the ledger's past, so this alone uses the superuser of the local cluster. Does
 * nothing for an account that has usage.
 */
export async function writeHistory(superuserUrl: string, spenders: Spender[], now: Date): Promise<void> {
  const client = new pg.Client({ connectionString: superuserUrl })
  await client.connect()
  try {
    const from = new Date(now.getTime() - DAYS * 86_400_000)
    await client.query("select make_usage_partitions($1::date, $2::date)", [from, now])
    for (const spender of spenders) await writeFor(client, spender, now)
  } finally {
    await client.end()
  }
}

async function writeFor(client: pg.Client, spender: Spender, now: Date): Promise<void> {
  const { rowCount } = await client.query("select from usage_event where account_id = $1 limit 1", [
    spender.account_id,
  ])
  if (rowCount) return
  const calls = callsUntil(now, spender.callsPerDay)
  await client.query("begin")
  await client.query(
    `insert into usage_event (account_id, at, id, key_id, mode, operation, units, engine_version, request_id)
     select $1, at, id, $2, 'live', operation, units, $3, request_id
       from unnest($4::timestamptz[], $5::text[], $6::text[], $7::integer[], $8::text[])
         as call (at, id, operation, units, request_id)`,
    [
      spender.account_id,
      spender.key_id,
      ENGINE_VERSION,
      calls.map((call) => call.at),
      calls.map(() => newId("call")),
      calls.map((call) => call.operation),
      calls.map((call) => call.units),
      calls.map(() => newId("request")),
    ],
  )
  await client.query(
    `insert into usage_hour (account_id, hour, mode, operation, key_id, calls, units)
     select account_id, date_trunc('hour', at, 'UTC'), mode, operation, key_id, count(*), sum(units)
       from usage_event where account_id = $1 group by 1, 2, 3, 4, 5
     on conflict (account_id, hour, mode, operation, key_id)
       do update set calls = excluded.calls, units = excluded.units`,
    [spender.account_id],
  )
  await client.query(
    `insert into usage_counter (account_id, mode, period_start, period_end, units)
     select $1, 'live', p.period_start, p.period_end,
            (select coalesce(sum(units), 0) from usage_event where account_id = $1 and at >= p.period_start)
       from account a cross join lateral metering_period('live', a.period_anchor, now()) p where a.id = $1
     on conflict (account_id, mode, period_start) do update set units = excluded.units`,
    [spender.account_id],
  )
  await client.query("commit")
}

interface PastCall {
  at: Date
  operation: string
  units: number
}

function callsUntil(now: Date, callsPerDay: number): PastCall[] {
  const random = randomFrom(20_261_201)
  const calls: PastCall[] = []
  for (let day = DAYS; day >= 0; day -= 1) {
    const midnight = new Date(now.getTime() - day * 86_400_000)
    midnight.setUTCHours(0, 0, 0, 0)
    const isWeekend = midnight.getUTCDay() % 6 === 0
    const count = Math.round(callsPerDay * (isWeekend ? 2 / 3 : 1) * (0.8 + 0.4 * random()))
    for (let each = 0; each < count; each += 1) {
      // Shoppers browse through the day and most in the evening: the sum of two throws, shifted.
      const hour = 7 + 8 * (random() + random())
      const at = new Date(midnight.getTime() + hour * 3_600_000)
      const throwOfOperation = random()
      const chosen = mix.find((_, index) => throwOfOperation < sumOfShares(index + 1)) ?? mix[0]!
      if (at < now) calls.push({ at, operation: chosen.operation, units: chosen.units })
    }
  }
  return calls
}

function sumOfShares(count: number): number {
  return mix.slice(0, count).reduce((sum, { share }) => sum + share, 0)
}

/** Numbers from 0 to 1 that are the same in each run: a linear congruential generator (Numerical Recipes, ch. 7). */
export function randomFrom(seed: number): () => number {
  let state = seed
  return () => {
    state = (Math.imul(state, 1_664_525) + 1_013_904_223) >>> 0
    return state / 2 ** 32
  }
}

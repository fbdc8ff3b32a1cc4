import { type RawBuilder, sql } from "kysely"
import { type Trx, withTenant } from "@/db"
import { type Co2Level, co2Levels } from "@/lib/chemistry/level"
import type { Call } from "@/lib/context"
import { type Verdict, verdicts } from "@/lib/flow/reactor-criteria"
import { type GasMethodName, gasMethods } from "@/lib/gas/methods"
import { khEdges_dkh, volumeEdges_l } from "./edges"
import { suppressed } from "./suppress"

const methodNames = Object.keys(gasMethods) as GasMethodName[]

/** Tanks from one value up to, and without, the next; `below` is null in the last bucket. */
export interface RangeBucket {
  readonly from: number
  readonly below: number | null
  readonly tanks: number
}

export interface NamedBucket<Name extends string> {
  readonly name: Name
  readonly tanks: number
}

export interface Distribution<Bucket> {
  /** Tanks of all buckets that are shown. */
  readonly tanks: number
  readonly buckets: Bucket[]
}

export interface TankInsights {
  readonly volume_l: Distribution<RangeBucket>
  readonly kh_dkh: Distribution<RangeBucket>
  readonly method: Distribution<NamedBucket<GasMethodName>>
  readonly level: Distribution<NamedBucket<Co2Level>>
  readonly verdict: Distribution<NamedBucket<Verdict>>
}

export interface Span {
  /** First and last day, inclusive, as `2026-12-01`, in UTC. */
  readonly from: string
  readonly to: string
}

/**
 * What the tanks look like that the account's widgets were asked about. Counts stand in steps of five and no bucket
 * holds fewer, so that no tank of one shopper can be told from them.
 */
export function tankInsights({ ctx, input }: Call<Span>): Promise<TankInsights> {
  return withTenant(ctx.account_id, async (trx) => {
    const tanksIn = counterOf(trx, ctx.account_id, input)
    return {
      volume_l: await ranges("volume_l", volumeEdges_l),
      kh_dkh: await ranges("kh_dkh", khEdges_dkh),
      method: await names("method", methodNames),
      level: await names("level", co2Levels),
      verdict: await names("verdict", verdicts),
    }

    async function ranges(column: string, edges: readonly number[]): Promise<Distribution<RangeBucket>> {
      const counted = await tanksIn(sql`width_bucket(${sql.ref(column)}, ${sql.val([...edges])}::float8[])`)
      return suppressed(
        edges.map((from, index) => ({
          from,
          below: edges[index + 1] ?? null,
          tanks: counted.get(String(index + 1)) ?? 0,
        })),
      )
    }

    async function names<Name extends string>(
      column: string,
      known: readonly Name[],
    ): Promise<Distribution<NamedBucket<Name>>> {
      const counted = await tanksIn(sql.ref(column))
      return suppressed(known.map((name) => ({ name, tanks: counted.get(name) ?? 0 })))
    }
  })
}

/** Counts the tanks of the days by what `group` gives for each; those for which it gives nothing are left out. */
function counterOf(trx: Trx, account_id: string, { from, to }: Span) {
  return async (group: RawBuilder<unknown>): Promise<Map<string, number>> => {
    const { rows } = await sql<{ bucket: string; tanks: number }>`
      select ${group}::text as bucket, count(*) as tanks from tank_event
       where account_id = ${account_id} and day between ${from}::date and ${to}::date and ${group} is not null
       group by 1`.execute(trx)
    return new Map(rows.map(({ bucket, tanks }) => [bucket, tanks]))
  }
}

"use client"

import { keepPreviousData, useQuery } from "@tanstack/react-query"
import { useMemo, useState } from "react"
import type { Usage as UsageAnswer } from "@/app/portal/usage-of"
import { ask, detailOf } from "@/app/ui/api"
import { type Column, DataTable } from "@/app/ui/data-table"
import { DayBars } from "@/app/ui/day-bars"
import { Select } from "@/app/ui/field"
import { Figure, FigureRow } from "@/app/ui/figure"
import { Gauge } from "@/app/ui/gauge"
import type { Json } from "@/app/ui/json"
import { PageHead, Section } from "@/app/ui/sheet"
import { Empty, Failed } from "@/app/ui/states"
import { Day, minuteOf } from "@/app/ui/time"

type Mode = "live" | "sandbox"
type Answer = Json<UsageAnswer>

const day_ms = 86_400_000

export function Usage({ account, initial }: { account: string; initial: Answer }) {
  const [mode, setMode] = useState<Mode>("live")
  const [days, setDays] = useState(30)
  const first = mode === "live" && days === 30
  const { data, error, refetch } = useQuery({
    queryKey: [account, "usage", mode, days],
    queryFn: () => ask<Answer>("GET", `/api/portal/${account}/usage?mode=${mode}&days=${days}`),
    initialData: first ? initial : undefined,
    placeholderData: keepPreviousData,
  })
  const rows = useMemo(() => (data ? everyDay(data) : []), [data])

  return (
    <>
      <PageHead
        title="Usage"
        lead="Units that were charged, from the ledger that invoices are made from. A call that failed costs nothing."
        actions={
          <>
            <Select label="Mode" value={mode} onChange={(event) => setMode(event.target.value as Mode)}>
              <option value="live">Live</option>
              <option value="sandbox">Sandbox</option>
            </Select>
            <Select label="Days" value={days} onChange={(event) => setDays(Number(event.target.value))}>
              {[7, 30, 90].map((count) => (
                <option key={count} value={count}>
                  Last {count}
                </option>
              ))}
            </Select>
          </>
        }
      />
      {error && <Failed detail={detailOf(error)} onRetry={refetch} />}
      {data && (
        <>
          <QuotaSection mode={mode} quota={data.quota} at={data.at} />
          <Section title="By day" note="A day ends at midnight UTC. The newest calls show within seconds.">
            {data.rows.length === 0 ? (
              <Empty title={`No ${mode} call in these ${days} days`}>
                {mode === "live"
                  ? "Sandbox calls are counted apart: switch the mode to see them."
                  : "Send one from the explorer; it shows here at once."}
              </Empty>
            ) : (
              <>
                <DayBars
                  days={rows.map(({ id, units, calls }) => ({
                    day: id,
                    value: units,
                    note: `${calls.toLocaleString("en")} calls`,
                  }))}
                  unit="units"
                  label={`Units a day over the last ${days} days; the table below has the numbers.`}
                  pace={mode === "live" ? data.quota.cap / lengthOf(data.quota) : undefined}
                />
                <details className="mt-6">
                  <summary className="link">As a table</summary>
                  <div className="mt-4">
                    <DataTable
                      caption="Usage by day"
                      columns={columns}
                      rows={rows}
                      fileName={`${account}-usage-${mode}`}
                      empty="No calls."
                      sortedBy={{ id: "day", desc: true }}
                    />
                  </div>
                </details>
              </>
            )}
          </Section>
        </>
      )}
    </>
  )
}

function QuotaSection({ mode, quota, at }: { mode: Mode; quota: Answer["quota"]; at: string }) {
  const spent_days = Math.max(0.25, (Date.parse(at) - Date.parse(quota.period_start)) / day_ms)
  const forecast = Math.round((quota.used / spent_days) * lengthOf(quota))
  return (
    <Section
      title={mode === "live" ? "This period" : "Today"}
      note={
        mode === "live"
          ? "When the units are used up, calls answer 402 until the period ends, or until an owner allows more."
          : "The sandbox is free. Its units count by day and are never billed."
      }
    >
      <FigureRow>
        <Figure label="Used" value={quota.used.toLocaleString("en")} unit="units" />
        <Figure label="Left" value={Math.max(0, quota.cap - quota.used).toLocaleString("en")} unit="units" />
        {mode === "live" && (
          <Figure
            label="At this pace"
            value={forecast.toLocaleString("en")}
            unit="units"
            under={forecast > quota.cap ? "more than the period holds" : "by the end of the period"}
          />
        )}
      </FigureRow>
      <div className="mt-5">
        <Gauge used={quota.used} cap={quota.cap} label="Used of this period" />
      </div>
      <p className="mt-3 text-sm text-soft">Counting begins anew on {minuteOf(quota.period_end)}.</p>
    </Section>
  )
}

interface DayRow {
  readonly id: string
  readonly calls: number
  readonly units: number
}

const columns: readonly Column<DayRow>[] = [
  { id: "day", header: "Day", value: ({ id }) => id, cell: ({ id }) => <Day at={id} /> },
  {
    id: "calls",
    header: "Calls",
    numeric: true,
    value: ({ calls }) => calls,
    cell: ({ calls }) => calls.toLocaleString("en"),
  },
  {
    id: "units",
    header: "Units",
    numeric: true,
    value: ({ units }) => units,
    cell: ({ units }) => units.toLocaleString("en"),
  },
]

/** A row for each day of the range, also for days without a call. */
function everyDay({ from, to, rows }: Answer): DayRow[] {
  const byDay = new Map(rows.map((row) => [row.group, row]))
  const count = Math.round((Date.parse(to) - Date.parse(from)) / day_ms) + 1
  return Array.from({ length: count }, (_, index) => {
    const id = new Date(Date.parse(from) + index * day_ms).toISOString().slice(0, 10)
    const found = byDay.get(id)
    return { id, calls: found?.calls ?? 0, units: found?.units ?? 0 }
  })
}

function lengthOf({ period_start, period_end }: Answer["quota"]): number {
  return (Date.parse(period_end) - Date.parse(period_start)) / day_ms
}

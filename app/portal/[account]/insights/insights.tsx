"use client"

import { keepPreviousData, useQuery } from "@tanstack/react-query"
import { useState } from "react"
import type { Insights as InsightsAnswer } from "@/app/portal/insights-of"
import { levelWords, methodWords, verdictWords } from "@/app/portal/tank-names"
import { ask, detailOf } from "@/app/ui/api"
import { Select } from "@/app/ui/field"
import type { Json } from "@/app/ui/json"
import { type Bar, CountBars } from "@/app/ui/plots/count-bars"
import { PageHead, Section } from "@/app/ui/sheet"
import { Empty, Failed } from "@/app/ui/states"
import { dayOf } from "@/app/ui/time"
import { khEdges_dkh, volumeEdges_l } from "@/lib/insights/edges"

type Answer = Json<InsightsAnswer>

const periods = [
  { days: 30, label: "Last 30 days" },
  { days: 90, label: "Last 90 days" },
  { days: 365, label: "Last year" },
]

const levelColours = {
  low: "var(--level-low)",
  in_range: "var(--level-in-range)",
  high: "var(--level-high)",
  dangerous: "var(--level-dangerous)",
}

/** What the tanks look like that shoppers asked about: plots of counts, never a person. */
export function Insights({ account, initial }: { account: string; initial: Answer }) {
  const [days, setDays] = useState(90)
  const { data, error, refetch } = useQuery({
    queryKey: [account, "insights", days],
    queryFn: () => ask<Answer>("GET", `/api/portal/${account}/insights?days=${days}`),
    initialData: days === 90 ? initial : undefined,
    placeholderData: keepPreviousData,
  })
  return (
    <>
      <PageHead
        title="Insights"
        lead="What the tanks look like that shoppers asked your widgets about. One page view is one tank, and nobody can be told from it."
        actions={
          <Select label="Period" value={days} onChange={(event) => setDays(Number(event.target.value))}>
            {periods.map(({ days, label }) => (
              <option key={days} value={days}>
                {label}
              </option>
            ))}
          </Select>
        }
      />
      {error && <Failed detail={detailOf(error)} onRetry={refetch} />}
      {data && (isEmpty(data) ? <Nothing days={days} /> : <Plots data={data} />)}
    </>
  )
}

function Plots({ data }: { data: Answer }) {
  const { volume_l, kh_dkh, level, method, verdict } = data
  const volumes = rangeBars(volumeEdges_l, volume_l.buckets)
  const hardness = rangeBars(khEdges_dkh, kh_dkh.buckets)
  return (
    <>
      <Section
        title="Volume"
        note={noteOf(volumes, "L", "What they ask about most is what to have in stock.")}
      >
        <Plot bars={volumes} title="Tanks by volume" axis="volume, L" />
      </Section>
      <Section
        title="Carbonate hardness"
        note={noteOf(
          hardness,
          "dKH",
          "It says which water your customers pour in, and so which pH they need.",
        )}
      >
        <Plot bars={hardness} title="Tanks by carbonate hardness" axis="KH, dKH" />
      </Section>
      <Section
        title="CO2 level"
        note="Judged by the upper end of what the shopper’s meter and test allow, as the widget told them."
      >
        <Plot
          bars={nameBars(levelWords, level.buckets, levelColours)}
          title="Tanks by CO2 level"
          axis="CO2 level"
        />
      </Section>
      <Section title="Method" note="How the gas gets into the water, as the widget advised or was told.">
        <Plot bars={nameBars(methodWords, method.buckets)} title="Tanks by method" axis="method" />
      </Section>
      <Section
        title="Reactor"
        note="Whether the filter’s flow suits the reactor that the shopper has in mind."
      >
        <Plot bars={nameBars(verdictWords, verdict.buckets)} title="Reactors by verdict" axis="verdict" />
      </Section>
      <p className="max-w-measure border-t border-line pt-6 text-sm text-soft">
        From {dayOf(data.from)} to {dayOf(data.to)}. Counts stand in steps of five, and a bar that would hold
        fewer than five tanks is left out, so that no shopper’s tank can be worked out from these plots. Each
        plot counts the tanks of which its figure is known.
      </p>
    </>
  )
}

function Plot({ bars, title, axis }: { bars: readonly Bar[]; title: string; axis: string }) {
  if (bars.every(({ count }) => count === 0)) {
    return (
      <p className="max-w-measure text-soft">
        Fewer than five tanks alike in this period. Choose a longer one, or put a calculator that asks for it
        on your pages.
      </p>
    )
  }
  return <CountBars title={title} bars={bars} counted="tanks" axis={axis} />
}

function Nothing({ days }: { days: number }) {
  return (
    <Empty title={`Not enough tanks in these ${days} days`}>
      <p>
        Put a widget on a product page: once a shopper has moved its fields and come to rest, their tank
        counts here. A plot begins with five tanks alike. A widget whose setting “statistics” is off tells
        nothing.
      </p>
    </Empty>
  )
}

function isEmpty({ volume_l, kh_dkh, level, method, verdict }: Answer): boolean {
  return [volume_l, kh_dkh, level, method, verdict].every(({ tanks }) => tanks === 0)
}

function rangeBars(
  edges: readonly number[],
  buckets: readonly { readonly from: number; readonly tanks: number }[],
): Bar[] {
  return edges.map((from, index) => {
    const below = edges[index + 1]
    return {
      label: below === undefined ? `${from}+` : `${from}–${below}`,
      count: buckets.find((bucket) => bucket.from === from)?.tanks ?? 0,
    }
  })
}

function nameBars<Name extends string>(
  words: Record<Name, string>,
  buckets: readonly { readonly name: Name; readonly tanks: number }[],
  colours?: Record<Name, string>,
): Bar[] {
  return (Object.keys(words) as Name[]).map((name) => ({
    label: words[name],
    count: buckets.find((bucket) => bucket.name === name)?.tanks ?? 0,
    ...(colours && { colour: colours[name] }),
  }))
}

function noteOf(bars: readonly Bar[], unit: string, use: string): string {
  const total = bars.reduce((sum, { count }) => sum + count, 0)
  const most = bars.reduce((one, other) => (other.count > one.count ? other : one))
  if (most.count === 0) return use
  const share = Math.round((100 * most.count) / total)
  return `Most often ${most.label} ${unit}: ${share} % of those shown. ${use}`
}

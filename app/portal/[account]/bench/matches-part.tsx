"use client"

import { keepPreviousData, useQuery } from "@tanstack/react-query"
import Link from "next/link"
import { ask, detailOf } from "@/app/ui/api"
import { Button } from "@/app/ui/button"
import { TickMark } from "@/app/ui/marks"
import { Empty, Failed, Loading } from "@/app/ui/states"
import { useBench } from "./bench-context"
import { type CatalogChoice, choiceOf, isChosen, type Match } from "./catalog-choice"
import { Part } from "./part"
import { useQuiet } from "./use-quiet"
import type { Worked } from "./work-out"

const kinds = {
  filter: "Filters",
  reactor: "Reactors",
  diffuser: "Diffusers",
  cylinder: "Cylinders",
} as const

/** The shop's own parts that fit this tank, asked of the server once the typing has paused. */
export function MatchesPart({
  account,
  worked,
  mayStock,
}: {
  account: string
  worked: Worked
  mayStock: boolean
}) {
  const request = useQuiet(worked.request, 700)
  const { data, error, refetch, isFetching } = useQuery({
    queryKey: [account, "bench-matches", request],
    queryFn: () => ask<{ matches: Match[] }>("POST", `/api/portal/${account}/bench/matches`, request),
    placeholderData: keepPreviousData,
    staleTime: 60_000,
  })
  const groups = Object.entries(kinds).map(([kind, title]) => ({
    title,
    found: data?.matches.filter((match) => match.kind === kind) ?? [],
  }))
  return (
    <Part title="From your shelf">
      {error && <Failed detail={detailOf(error)} onRetry={refetch} />}
      {!data && !error && <Loading label="Your catalogue is being matched" rows={3} />}
      {data?.matches.length === 0 && (
        <Empty title="None of your parts fits this tank yet">
          {mayStock ? (
            <>
              Filters, reactors, cylinders and diffusers of{" "}
              <Link className="link" href={`/portal/${account}/catalog`}>
                your catalogue
              </Link>{" "}
              are solved in this very loop and ranked here.
            </>
          ) : (
            "Filters, reactors, cylinders and diffusers of the shop's catalogue are solved in this very loop and ranked here. A merchandiser can add them."
          )}
        </Empty>
      )}
      <div aria-busy={isFetching} className="space-y-6">
        {groups
          .filter(({ found }) => found.length > 0)
          .map(({ title, found }) => (
            <section key={title} aria-label={title}>
              <h3 className="font-semibold">{title}</h3>
              <ol className="mt-2 divide-y divide-line border-y border-line">
                {found.slice(0, 5).map((match) => (
                  <MatchRow key={match.item_id} match={match} />
                ))}
              </ol>
              {found.length > 5 && (
                <p className="mt-1 text-sm text-soft">{found.length - 5} more fit less closely.</p>
              )}
            </section>
          ))}
      </div>
    </Part>
  )
}

function MatchRow({ match }: { match: Match }) {
  const { form, units, fill } = useBench()
  const { item } = match
  const choice: CatalogChoice = choiceOf(item)
  const price =
    item.price_minor !== null && item.currency
      ? new Intl.NumberFormat("en", { style: "currency", currency: item.currency }).format(
          item.price_minor / 100,
        )
      : undefined
  const more = Math.round(100 * match.margin)
  const taken = isChosen(choice, units, form.getValues())
  return (
    <li className="grid gap-x-6 gap-y-2 py-3 @min-[36rem]:grid-cols-[minmax(0,1fr)_auto]">
      <div>
        <p>
          <span className="font-medium">{match.name}</span>
          {price && <span className="ml-3 font-mono text-sm text-soft">{price}</span>}
        </p>
        <p className="text-sm text-soft">{match.reason}</p>
        <p className={`text-sm font-medium ${match.fit === "good" ? "text-action" : "text-warning"}`}>
          {match.fit === "good" ? "fits well" : "fits just"}, {more} % above the need
        </p>
      </div>
      {taken ? (
        <p className="flex min-h-8 items-center gap-1.5 self-start text-sm text-soft">
          <TickMark className="size-3.5" /> in this plan
        </p>
      ) : (
        <Button small className="self-start" onClick={() => fill(choice.values, choice.chosen)}>
          Plan with it
        </Button>
      )}
    </li>
  )
}

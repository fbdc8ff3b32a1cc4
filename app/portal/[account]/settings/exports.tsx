"use client"

import { useMutation, useQuery, useQueryClient } from "@tanstack/react-query"
import { ask, detailOf } from "@/app/ui/api"
import { Button } from "@/app/ui/button"
import type { Json } from "@/app/ui/json"
import { Notice } from "@/app/ui/notice"
import { dayOf, minuteOf } from "@/app/ui/time"
import type { AccountExport } from "@/lib/exports"

type Row = Json<AccountExport>

const lookAgain_ms = 3_000

/** The archives of the account's data; one that is under way appears by itself when it is finished. */
export function Exports({ account, initial }: { account: string; initial: Row[] }) {
  const path = `/api/portal/${account}/exports`
  const cache = useQueryClient()
  const { data } = useQuery({
    queryKey: [account, "exports"],
    queryFn: () => ask<Row[]>("GET", path),
    initialData: initial,
    refetchInterval: ({ state }) => (state.data?.some(isUnderWay) ? lookAgain_ms : false),
  })
  const request = useMutation({
    mutationFn: () => ask("POST", path, {}),
    onSuccess: () => cache.invalidateQueries({ queryKey: [account, "exports"] }),
  })
  return (
    <div className="max-w-xl space-y-5">
      {request.error && (
        <Notice severity="danger" live>
          {detailOf(request.error)}
        </Notice>
      )}
      <ul className="divide-y divide-line border-y border-line empty:hidden">
        {data.map((row) => (
          <li key={row.id} className="flex flex-wrap items-baseline justify-between gap-x-6 gap-y-1 py-2.5">
            <span>
              {minuteOf(row.requested_at)}
              {row.size_bytes !== null && (
                <span className="ml-3 font-mono text-sm text-soft">{sizeOf(row.size_bytes)}</span>
              )}
            </span>
            {isUnderWay(row) ? (
              <span role="status" className="text-soft">
                being made; you may leave this page
              </span>
            ) : (
              <span className="text-sm">
                <a className="link" href={`${path}/${row.id}`} download>
                  Fetch<span className="sr-only"> the archive of {minuteOf(row.requested_at)}</span>
                </a>{" "}
                <span className="text-soft">until {dayOf(row.expires_at)}</span>
              </span>
            )}
          </li>
        ))}
      </ul>
      <p className="max-w-measure text-sm text-soft">
        It holds personal data of your team and of shoppers who wrote to you. Keep it as carefully as you
        would their letters, and delete it when you no longer need it.
      </p>
      <Button busy={request.isPending} disabled={data.some(isUnderWay)} onClick={() => request.mutate()}>
        Make an archive
      </Button>
    </div>
  )
}

function isUnderWay({ finished_at }: Row): boolean {
  return finished_at === null
}

function sizeOf(bytes: number): string {
  return bytes < 1_000_000 ? `${Math.ceil(bytes / 1000)} kB` : `${(bytes / 1_000_000).toFixed(1)} MB`
}

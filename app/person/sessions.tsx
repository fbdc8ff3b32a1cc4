"use client"

import { useMutation, useQuery, useQueryClient } from "@tanstack/react-query"
import { ask, detailOf } from "@/app/ui/api"
import { Button } from "@/app/ui/button"
import { type Column, DataTable } from "@/app/ui/data-table"
import type { Json } from "@/app/ui/json"
import { Notice } from "@/app/ui/notice"
import { Day, Minute } from "@/app/ui/time"
import type { OwnSession } from "@/lib/accounts"
import { deviceOf } from "./device"

type Row = Json<OwnSession>

const path = "/api/person/sessions"

/** Where the person is signed in, and how to end it. */
export function Sessions({ initial }: { initial: Row[] }) {
  const cache = useQueryClient()
  const { data } = useQuery({
    queryKey: ["sessions"],
    queryFn: () => ask<Row[]>("GET", path),
    initialData: initial,
  })
  const onSettled = () => cache.invalidateQueries({ queryKey: ["sessions"] })
  const end = useMutation({ mutationFn: ({ id }: Row) => ask("DELETE", `${path}/${id}`), onSettled })
  const endOthers = useMutation({ mutationFn: () => ask("DELETE", path), onSettled })
  const problem = end.error ?? endOthers.error
  return (
    <div className="space-y-5">
      {problem && (
        <Notice severity="danger" live>
          {detailOf(problem)}
        </Notice>
      )}
      <DataTable
        caption="Your sessions"
        columns={columns}
        rows={data}
        fileName="sessions"
        empty="None."
        actions={(session) =>
          !session.is_this && (
            <Button
              look="quiet"
              small
              busy={end.isPending && end.variables.id === session.id}
              onClick={() => end.mutate(session)}
            >
              End<span className="sr-only"> the session of {deviceOf(session.user_agent)}</span>
            </Button>
          )
        }
      />
      <Button
        busy={endOthers.isPending}
        disabled={data.every(({ is_this }) => is_this)}
        onClick={() => endOthers.mutate()}
      >
        End all others
      </Button>
    </div>
  )
}

const columns: readonly Column<Row>[] = [
  {
    id: "device",
    header: "Device",
    value: ({ user_agent }) => deviceOf(user_agent),
    cell: ({ user_agent, is_this }) => (
      <>
        <span className="block font-medium">{deviceOf(user_agent)}</span>
        {is_this && <span className="block text-action">this session</span>}
      </>
    ),
  },
  {
    id: "place",
    header: "Network address",
    value: ({ ip }) => ip,
    cell: ({ ip }) => <span className="font-mono text-[0.8125rem]">{ip ?? "unknown"}</span>,
  },
  {
    id: "seen",
    header: "Last seen",
    value: ({ last_seen_at }) => last_seen_at,
    cell: ({ last_seen_at }) => <Minute at={last_seen_at} />,
  },
  {
    id: "since",
    header: "Since",
    value: ({ created_at }) => created_at,
    cell: ({ created_at }) => <Day at={created_at} />,
  },
]

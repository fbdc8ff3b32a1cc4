"use client"

import { useQuery, useQueryClient } from "@tanstack/react-query"
import Link from "next/link"
import { useMemo, useState } from "react"
import { ask, detailOf } from "@/app/ui/api"
import { Button } from "@/app/ui/button"
import { type Column, DataTable } from "@/app/ui/data-table"
import type { Json } from "@/app/ui/json"
import { PageHead } from "@/app/ui/sheet"
import { Empty, Failed } from "@/app/ui/states"
import { Day } from "@/app/ui/time"
import type { Endpoint as StoredEndpoint } from "@/lib/webhooks"
import { EndpointDialog } from "./endpoint-dialog"
import { stateOf } from "./endpoint-state"

export type Endpoint = Json<StoredEndpoint>

export interface EventChoice {
  readonly type: string
  readonly summary: string
}

interface Props {
  account: string
  initial: Endpoint[]
  events: readonly EventChoice[]
  manages: boolean
}

/** Where the account is told what happens in it. */
export function Webhooks({ account, initial, events, manages }: Props) {
  const path = `/api/portal/${account}/webhooks`
  const cache = useQueryClient()
  const { data, error, refetch } = useQuery({
    queryKey: [account, "webhooks"],
    queryFn: () => ask<Endpoint[]>("GET", path),
    initialData: initial,
  })
  const [isNew, setNew] = useState(false)
  const columns = useMemo(() => columnsOf(account), [account])
  const open = manages && (
    <Button look="primary" onClick={() => setNew(true)}>
      New endpoint
    </Button>
  )
  return (
    <>
      <PageHead
        title="Webhooks"
        lead="We post what happens in this account to your servers, signed after the Standard Webhooks specification and repeated until it arrives."
        actions={data.length > 0 && open}
      />
      {error && <Failed detail={detailOf(error)} onRetry={refetch} />}
      {data.length === 0 ? (
        <Empty title="No endpoint yet" action={open}>
          <p>
            An endpoint is an https address of yours. It can be told of new enquiries and reports, of a quota
            that runs out, of a key that was revoked, and of a change of plan.
          </p>
        </Empty>
      ) : (
        <DataTable
          caption="Webhook endpoints"
          columns={columns}
          rows={data}
          fileName={`${account}-webhooks`}
          empty="No endpoint fits."
        />
      )}
      {isNew && (
        <EndpointDialog
          path={path}
          events={events}
          onDone={() => cache.invalidateQueries({ queryKey: [account, "webhooks"] })}
          onClose={() => setNew(false)}
        />
      )}
    </>
  )
}

function columnsOf(account: string): readonly Column<Endpoint>[] {
  return [
    {
      id: "url",
      header: "Address",
      value: ({ url }) => url,
      cell: ({ id, url }) => (
        <Link
          className="link block max-w-96 min-w-44 font-mono text-sm break-all"
          href={`/portal/${account}/webhooks/${id}`}
        >
          {url}
        </Link>
      ),
    },
    {
      id: "events",
      header: "Is told of",
      value: ({ events }) => events.join(" "),
      cell: ({ events }) => <span className="text-sm">{events.join(", ")}</span>,
    },
    { id: "state", header: "State", value: stateOf },
    {
      id: "created",
      header: "Made",
      value: ({ created_at }) => created_at,
      cell: ({ created_at }) => <Day at={created_at} />,
    },
  ]
}

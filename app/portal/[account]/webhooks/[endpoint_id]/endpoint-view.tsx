"use client"

import { useMutation, useQuery, useQueryClient } from "@tanstack/react-query"
import { useRouter } from "next/navigation"
import { useMemo, useState } from "react"
import { ask, detailOf } from "@/app/ui/api"
import { Button } from "@/app/ui/button"
import { type Column, DataTable } from "@/app/ui/data-table"
import type { Json } from "@/app/ui/json"
import { Notice } from "@/app/ui/notice"
import { PageHead } from "@/app/ui/sheet"
import { Failed } from "@/app/ui/states"
import { Minute } from "@/app/ui/time"
import type { Delivery as StoredDelivery } from "@/lib/webhooks"
import { EndpointDialog } from "../endpoint-dialog"
import { stateOf } from "../endpoint-state"
import type { Endpoint, EventChoice } from "../webhooks"
import { DeleteEndpoint } from "./delete-endpoint"
import { DeliveryDialog } from "./delivery-dialog"
import { Secret } from "./secret"

export type Delivery = Json<StoredDelivery>

interface Props {
  account: string
  endpoint: Endpoint
  initial: Delivery[]
  events: readonly EventChoice[]
  /** What each failure of a delivery means. */
  failures: Readonly<Record<string, string>>
  manages: boolean
}

/** One endpoint: what it is told of, how it is signed, and what became of each delivery. */
export function EndpointView({ account, endpoint, initial, events, failures, manages }: Props) {
  const path = `/api/portal/${account}/webhooks/${endpoint.id}`
  const router = useRouter()
  const cache = useQueryClient()
  const { data, error, refetch } = useQuery({
    queryKey: [account, "webhooks", endpoint.id],
    queryFn: () => ask<Delivery[]>("GET", `${path}/deliveries`),
    initialData: initial,
    // What waits to be sent changes without us.
    refetchInterval: ({ state }) => (state.data?.some(({ status }) => status === "pending") ? 2_000 : false),
  })
  const [act, setAct] = useState<"change" | "delete">()
  const [openId, setOpenId] = useState<string>()
  const pause = useMutation({
    mutationFn: (disabled: boolean) => ask("PATCH", path, { disabled }),
    onSuccess: () => router.refresh(),
  })
  const test = useMutation({ mutationFn: () => ask("POST", `${path}/test`, {}), onSuccess: () => refetch() })
  const columns = useMemo(() => columnsOf(failures, setOpenId), [failures])
  const opened = data.find(({ id }) => id === openId)
  const problem = pause.error ?? test.error
  const isOff = endpoint.disabled_at !== null
  return (
    <>
      <PageHead
        title="Webhook endpoint"
        lead={
          <>
            <span className="block font-mono break-all text-ink">{endpoint.url}</span>
            <span className="mt-1 block">
              {stateOf(endpoint)}; is told of {endpoint.events.join(", ")}.
            </span>
          </>
        }
        actions={
          manages && (
            <>
              {!isOff && (
                <Button look="primary" busy={test.isPending} onClick={() => test.mutate()}>
                  Send a test event
                </Button>
              )}
              <Button onClick={() => setAct("change")}>Change</Button>
              <Button busy={pause.isPending} onClick={() => pause.mutate(!isOff)}>
                {isOff ? "Switch on" : "Pause"}
              </Button>
              <Button onClick={() => setAct("delete")}>Delete</Button>
            </>
          )
        }
      />
      {problem && (
        <div className="mb-6">
          <Notice severity="danger" live>
            {detailOf(problem)}
          </Notice>
        </div>
      )}
      {manages && <Secret path={path} />}
      <h2 className="mt-8 mb-4 text-xl">Deliveries</h2>
      {error && <Failed detail={detailOf(error)} onRetry={refetch} />}
      <DataTable
        caption="Deliveries to this endpoint, newest first"
        columns={columns}
        rows={data}
        fileName={`${account}-deliveries`}
        empty="Nothing was sent yet. A test event shows that your server answers and that the signature is right."
      />
      {opened && (
        <DeliveryDialog
          path={`${path}/deliveries/${opened.id}`}
          delivery={opened}
          failure={opened.last_failure ? failures[opened.last_failure] : undefined}
          mayReplay={manages && !isOff}
          onReplayed={() => refetch()}
          onClose={() => setOpenId(undefined)}
        />
      )}
      {act === "change" && (
        <EndpointDialog
          path={`/api/portal/${account}/webhooks`}
          endpoint={endpoint}
          events={events}
          onDone={() => router.refresh()}
          onClose={() => setAct(undefined)}
        />
      )}
      {act === "delete" && (
        <DeleteEndpoint
          path={path}
          url={endpoint.url}
          onDone={() => {
            // The list was read before, and would show it still.
            cache.removeQueries({ queryKey: [account, "webhooks"], exact: true })
            router.push(`/portal/${account}/webhooks`)
          }}
          onClose={() => setAct(undefined)}
        />
      )}
    </>
  )
}

const words = { pending: "waits", delivered: "delivered", failed: "given up" }

function columnsOf(
  failures: Readonly<Record<string, string>>,
  onOpen: (id: string) => void,
): readonly Column<Delivery>[] {
  return [
    {
      id: "created",
      header: "When",
      value: ({ created_at }) => created_at,
      cell: ({ created_at }) => <Minute at={created_at} />,
    },
    {
      id: "type",
      header: "Event",
      value: ({ type }) => type,
      cell: ({ id, type }) => (
        <button type="button" className="link text-left font-mono text-sm" onClick={() => onOpen(id)}>
          {type}
        </button>
      ),
    },
    { id: "status", header: "State", value: ({ status }) => words[status] },
    { id: "attempts", header: "Attempts", numeric: true, value: ({ attempts }) => attempts },
    {
      id: "answer",
      header: "Last answer",
      value: ({ last_status, last_failure }) =>
        [last_status, last_failure ? failures[last_failure] : undefined].filter(Boolean).join(", "),
    },
  ]
}

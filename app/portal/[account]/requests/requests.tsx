"use client"

import { useInfiniteQuery } from "@tanstack/react-query"
import Link from "next/link"
import { useMemo, useState } from "react"
import { ask, detailOf } from "@/app/ui/api"
import { Button } from "@/app/ui/button"
import { type Column, DataTable } from "@/app/ui/data-table"
import { Select } from "@/app/ui/field"
import type { Json } from "@/app/ui/json"
import { PageHead } from "@/app/ui/sheet"
import { Empty, Failed, Loading } from "@/app/ui/states"
import { Minute } from "@/app/ui/time"
import type { LoggedCall } from "@/lib/usage"
import { REQUESTS_A_PAGE } from "./page-size"
import { RequestDialog } from "./request-dialog"

export type Logged = Json<LoggedCall>

interface Props {
  account: string
  initial: Logged[]
  keyNames: Record<string, string>
  /** Days that the log reaches back. */
  days: number
}

type Outcome = "" | "success" | "refused"

/** Every call of the account's keys, and for each that was refused why, in words. */
export function Requests({ account, initial, keyNames, days }: Props) {
  const [outcome, setOutcome] = useState<Outcome>("")
  const [keyId, setKeyId] = useState("")
  const [opened, setOpened] = useState<Logged>()
  const isFirst = outcome === "" && keyId === ""
  const { data, error, refetch, isPending, hasNextPage, fetchNextPage, isFetchingNextPage } =
    useInfiniteQuery({
      queryKey: [account, "requests", outcome, keyId],
      queryFn: ({ pageParam }) =>
        ask<Logged[]>("GET", `/api/portal/${account}/requests?${queryOf(outcome, keyId, pageParam)}`),
      initialPageParam: undefined as Logged | undefined,
      getNextPageParam: (page: Logged[]) => (page.length === REQUESTS_A_PAGE ? page.at(-1) : undefined),
      ...(isFirst && { initialData: { pages: [initial], pageParams: [undefined] } }),
    })
  const rows = useMemo(() => data?.pages.flat() ?? [], [data])
  const columns = useMemo(() => columnsOf(keyNames, setOpened), [keyNames])
  return (
    <>
      <PageHead
        title="Requests"
        lead={`What your keys asked in the last ${days} days, newest first. Bodies are not kept; of a refusal its reason is.`}
      />
      {initial.length === 0 && isFirst ? (
        <Empty title="No call yet">
          <p>
            Make one in the{" "}
            <Link className="link" href={`/portal/${account}/explorer`}>
              explorer
            </Link>{" "}
            or with a key of yours; it is here a moment later, with its reason if it was refused.
          </p>
        </Empty>
      ) : (
        <>
          <div className="mb-5 flex flex-wrap gap-4">
            <Select
              label="Outcome"
              value={outcome}
              onChange={(event) => setOutcome(event.target.value as Outcome)}
            >
              <option value="">All</option>
              <option value="success">Answered</option>
              <option value="refused">Refused</option>
            </Select>
            <Select label="Key" value={keyId} onChange={(event) => setKeyId(event.target.value)}>
              <option value="">All</option>
              {Object.entries(keyNames).map(([id, name]) => (
                <option key={id} value={id}>
                  {name}
                </option>
              ))}
            </Select>
          </div>
          {error && <Failed detail={detailOf(error)} onRetry={refetch} />}
          {isPending ? (
            <Loading label="Requests are loading" />
          ) : (
            <DataTable
              caption="Requests"
              columns={columns}
              rows={rows}
              fileName={`${account}-requests`}
              empty="No call fits."
            />
          )}
          {hasNextPage && (
            <Button className="mt-5" busy={isFetchingNextPage} onClick={() => fetchNextPage()}>
              Fetch older ones
            </Button>
          )}
        </>
      )}
      {opened && (
        <RequestDialog call={opened} keyName={keyNames[opened.key_id]} onClose={() => setOpened(undefined)} />
      )}
    </>
  )
}

function queryOf(outcome: Outcome, key_id: string, last: Logged | undefined): URLSearchParams {
  return new URLSearchParams({
    ...(outcome && { outcome }),
    ...(key_id && { key_id }),
    ...(last && { before_at: last.exact_at, before_id: last.id }),
  })
}

function columnsOf(
  keyNames: Readonly<Record<string, string>>,
  onOpen: (call: Logged) => void,
): readonly Column<Logged>[] {
  return [
    { id: "at", header: "When", value: ({ at }) => at, cell: ({ at }) => <Minute at={at} /> },
    {
      id: "what",
      header: "What",
      value: ({ what }) => what,
      cell: (call) => (
        <button
          type="button"
          className="link text-left font-mono text-sm break-all"
          onClick={() => onOpen(call)}
        >
          {call.what}
          {call.calls > 1 && ` × ${call.calls}`}
        </button>
      ),
    },
    {
      id: "status",
      header: "Status",
      value: ({ status, code }) => [status, code].filter(Boolean).join(" "),
      cell: ({ status, code }) => (
        <span className={code ? "text-danger" : undefined}>
          <span className="font-mono">{status}</span>
          {code && <span className="block text-xs">{code}</span>}
        </span>
      ),
    },
    { id: "key", header: "Key", value: ({ key_id }) => keyNames[key_id] ?? key_id },
    { id: "mode", header: "Mode", value: ({ mode }) => mode },
    { id: "units", header: "Units", numeric: true, value: ({ units }) => units },
  ]
}

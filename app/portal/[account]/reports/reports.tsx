"use client"

import { useQuery, useQueryClient } from "@tanstack/react-query"
import Link from "next/link"
import { useMemo, useState } from "react"
import type { ShownReport as StoredReport } from "@/app/portal/newest-reports"
import { ask, detailOf } from "@/app/ui/api"
import { ButtonLink } from "@/app/ui/button"
import { type Column, DataTable } from "@/app/ui/data-table"
import type { Json } from "@/app/ui/json"
import { PageHead } from "@/app/ui/sheet"
import { Empty, Failed } from "@/app/ui/states"
import { Day } from "@/app/ui/time"
import { DeleteReport } from "./delete-report"
import { MOST_SHOWN } from "./most-shown"

export type ShownReport = Json<StoredReport>

interface Props {
  account: string
  initial: ShownReport[]
  person: string
  /** Whether the person may delete and share what others made, too. */
  managesAll: boolean
}

/** The sheets that were made at the counter and through the API. */
export function Reports({ account, initial, person, managesAll }: Props) {
  const cache = useQueryClient()
  const { data, error, refetch } = useQuery({
    queryKey: [account, "reports"],
    queryFn: () => ask<ShownReport[]>("GET", `/api/portal/${account}/reports`),
    initialData: initial,
  })
  const [deleting, setDeleting] = useState<ShownReport>()
  const columns = useMemo(() => columnsOf(account), [account])
  const bench = (
    <ButtonLink look="primary" href={`/portal/${account}/bench`}>
      Open the Bench
    </ButtonLink>
  )
  return (
    <>
      <PageHead
        title="Reports"
        lead="Sheets to hand over: each keeps its result as it was calculated, with its cautions and sources."
        actions={data.length > 0 && bench}
      />
      {error && <Failed detail={detailOf(error)} onRetry={refetch} />}
      {data.length === 0 ? (
        <Empty title="No report yet" action={bench}>
          <p>
            Work out a customer’s tank on the Bench and save it. The report can be printed, kept as a PDF,
            sent by mail, or shared by a link that you can take back. Your own software makes them by{" "}
            <code>POST /reports</code>.
          </p>
        </Empty>
      ) : (
        <DataTable
          caption="Reports"
          columns={columns}
          rows={data}
          empty="No report fits."
          sortedBy={{ id: "created", desc: true }}
          fileName={`${account}-reports`}
          actions={(report) => (
            <span className="flex justify-end gap-4">
              <a className="link" href={`/api/portal/${account}/reports/${report.id}/pdf`}>
                PDF
              </a>
              {(managesAll || report.created_by === person) && (
                <button type="button" className="link" onClick={() => setDeleting(report)}>
                  Delete
                  <span className="sr-only"> {report.title}</span>
                </button>
              )}
            </span>
          )}
        />
      )}
      {data.length === MOST_SHOWN && (
        <p className="mt-3 text-sm text-soft">
          These are the newest {MOST_SHOWN}. Older ones are in the API as <code>GET /reports</code>.
        </p>
      )}
      {deleting && (
        <DeleteReport
          account={account}
          report={deleting}
          onClose={() => setDeleting(undefined)}
          onDone={() => cache.invalidateQueries({ queryKey: [account, "reports"] })}
        />
      )}
    </>
  )
}

function columnsOf(account: string): readonly Column<ShownReport>[] {
  return [
    {
      id: "created",
      header: "Made",
      value: ({ created_at }) => created_at,
      cell: ({ created_at }) => <Day at={created_at} />,
    },
    {
      id: "title",
      header: "Title",
      value: ({ title }) => title,
      cell: ({ id, title }) => (
        <Link className="link block min-w-44" href={`/portal/${account}/reports/${id}`}>
          {title}
        </Link>
      ),
    },
    { id: "shopper", header: "For", value: ({ shopper }) => shopper ?? "" },
    { id: "kind", header: "What", value: ({ kind_name }) => kind_name },
    {
      id: "shared",
      header: "Shared",
      value: ({ shared_url }) => (shared_url ? "yes" : "no"),
      cell: ({ shared_url }) =>
        shared_url ? (
          <a className="link" href={shared_url}>
            yes
          </a>
        ) : (
          "no"
        ),
    },
  ]
}

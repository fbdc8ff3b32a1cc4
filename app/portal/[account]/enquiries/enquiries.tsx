"use client"

import { useMutation, useQuery, useQueryClient } from "@tanstack/react-query"
import Link from "next/link"
import { useMemo, useState } from "react"

import { ask, detailOf } from "@/app/ui/api"
import { Button } from "@/app/ui/button"
import { type Column, DataTable } from "@/app/ui/data-table"
import { download } from "@/app/ui/download"
import type { Json } from "@/app/ui/json"
import { Notice } from "@/app/ui/notice"
import { PageHead } from "@/app/ui/sheet"
import { Empty, Failed } from "@/app/ui/states"
import { Day } from "@/app/ui/time"
import type { Enquiry as StoredEnquiry } from "@/lib/enquiries"
import { EnquiryDialog } from "./enquiry-dialog"
import { EraseDialog } from "./erase-dialog"
import { MOST_SHOWN } from "./most-shown"
import { languageNames, tankLine } from "./tank-words"

export type Enquiry = Json<StoredEnquiry>

interface Props {
  account: string
  initial: Enquiry[]
  widgetNames: Record<string, string>
  takesEnquiries: boolean
  /** The one that a mail leads to. */
  firstOpen: string | undefined
  may: { erase: boolean; export: boolean }
}

/** What shoppers asked: who, what, about which tank; with the record of their consent one click away. */
export function Enquiries({ account, initial, widgetNames, takesEnquiries, firstOpen, may }: Props) {
  const path = `/api/portal/${account}/enquiries`
  const cache = useQueryClient()
  const { data, error, refetch } = useQuery({
    queryKey: [account, "enquiries"],
    queryFn: () => ask<Enquiry[]>("GET", path),
    initialData: initial,
  })
  const [openId, setOpenId] = useState(firstOpen)
  const [isErasing, setErasing] = useState(false)
  const [withErased, setWithErased] = useState(false)
  const taken = useMutation({
    mutationFn: () => ask<{ csv: string }>("POST", `${path}/export`, {}),
    onSuccess: ({ csv }) => download(`${account}-enquiries.csv`, csv),
  })
  const columns = useMemo(() => columnsOf(widgetNames, setOpenId), [widgetNames])
  const opened = data.find(({ id }) => id === openId)
  const erased = data.filter(({ erased_at }) => erased_at).length

  return (
    <>
      <PageHead
        title="Enquiries"
        lead="What shoppers asked you through your widgets, with their consent. Each is kept for 180 days, or until it is erased."
        actions={
          may.export &&
          data.length > 0 && (
            <Button busy={taken.isPending} onClick={() => taken.mutate()}>
              Export all as CSV
            </Button>
          )
        }
      />
      {taken.error && (
        <div className="mb-6">
          <Notice severity="danger" live>
            {detailOf(taken.error)}
          </Notice>
        </div>
      )}
      {error && <Failed detail={detailOf(error)} onRetry={refetch} />}
      {data.length === 0 ? (
        <Empty title="Nobody has asked anything yet">
          {takesEnquiries ? (
            <p>
              The part “Ask the shop” is on. What a shopper writes there comes here, and a mail tells the
              owners and the merchandisers.
            </p>
          ) : (
            <p>
              A widget can carry the part “Ask the shop”. Give the widget the address of your privacy page in
              its settings, and the part appears under the calculator. You get the question, the shopper’s
              address and the figures of their tank.
            </p>
          )}
        </Empty>
      ) : (
        <DataTable
          caption="Enquiries of shoppers"
          columns={columns}
          rows={withErased ? data : data.filter(({ erased_at }) => !erased_at)}
          empty="All enquiries are erased. Show the erased ones to see what is left of them."
          sortedBy={{ id: "created", desc: true }}
          toolbar={
            erased > 0 && (
              <label className="flex min-h-8 items-center gap-2 text-sm">
                <input
                  type="checkbox"
                  checked={withErased}
                  onChange={(event) => setWithErased(event.target.checked)}
                />
                Show erased ones ({erased})
              </label>
            )
          }
        />
      )}
      {data.length === MOST_SHOWN && (
        <p className="mt-3 text-sm text-soft">
          These are the newest {MOST_SHOWN}. Older ones are in the file, and in{" "}
          <Link className="link" href="/docs">
            the API
          </Link>{" "}
          as <code>GET /enquiries</code>.
        </p>
      )}
      {opened && !isErasing && (
        <EnquiryDialog
          item={opened}
          widgetName={widgetNames[opened.widget_id]}
          onErase={may.erase && !opened.erased_at ? () => setErasing(true) : undefined}
          onClose={() => setOpenId(undefined)}
        />
      )}
      {opened && isErasing && (
        <EraseDialog
          path={path}
          item={opened}
          onDone={() => {
            setOpenId(undefined)
            return cache.invalidateQueries({ queryKey: [account, "enquiries"] })
          }}
          onClose={() => setErasing(false)}
        />
      )}
    </>
  )
}

function columnsOf(
  widgetNames: Record<string, string>,
  onOpen: (id: string) => void,
): readonly Column<Enquiry>[] {
  const widget: Column<Enquiry> = {
    id: "widget",
    header: "Widget",
    value: ({ widget_id }) => widgetNames[widget_id] ?? "a deleted widget",
  }
  return [
    {
      id: "created",
      header: "Asked",
      value: ({ created_at }) => created_at,
      cell: ({ created_at }) => <Day at={created_at} />,
    },
    {
      id: "from",
      header: "From",
      value: ({ name, email }) => [name, email].filter(Boolean).join(" "),
      cell: ({ id, name, email }) => (
        <span className="block min-w-44">
          <button type="button" className="link text-left" onClick={() => onOpen(id)}>
            {name ?? email ?? "erased"}
          </button>
          {name && <span className="block break-words text-soft">{email}</span>}
        </span>
      ),
    },
    {
      id: "message",
      header: "Question",
      value: ({ message }) => message,
      cell: ({ message, language }) => (
        <span lang={language} className="line-clamp-2 max-w-96 min-w-48">
          {message}
        </span>
      ),
    },
    {
      id: "tank",
      header: "Tank",
      value: ({ tank }) => tankLine(tank),
      cell: ({ tank }) => <span className="block min-w-44 font-mono text-xs">{tankLine(tank)}</span>,
    },
    { id: "language", header: "Language", value: ({ language }) => languageNames[language] },
    ...(Object.keys(widgetNames).length > 1 ? [widget] : []),
  ]
}

"use client"

import { type Column, DataTable } from "@/app/ui/data-table"
import { Minute } from "@/app/ui/time"

export interface Row {
  readonly id: string
  readonly at: string
  readonly who: string
  readonly what: string
  readonly target: string | null
  readonly detail: Readonly<Record<string, unknown>>
  readonly ip: string | null
}

export function Audit({ account, rows }: { account: string; rows: readonly Row[] }) {
  return (
    <DataTable
      caption="Audit trail"
      columns={columns}
      rows={rows}
      fileName={`${account}-audit`}
      empty="Nothing was changed yet."
    />
  )
}

const columns: readonly Column<Row>[] = [
  { id: "at", header: "When", value: ({ at }) => at, cell: ({ at }) => <Minute at={at} /> },
  { id: "who", header: "Who", value: ({ who }) => who },
  {
    id: "what",
    header: "What",
    value: ({ what, detail, target }) => [what, detailsOf(detail), target].filter(Boolean).join("; "),
    cell: ({ what, detail, target }) => (
      <>
        <span className="block font-medium">{what}</span>
        <span className="block max-w-96 text-soft [overflow-wrap:anywhere]">
          {detailsOf(detail) || target}
        </span>
      </>
    ),
  },
  {
    id: "ip",
    header: "From",
    value: ({ ip }) => ip,
    cell: ({ ip }) => <span className="font-mono text-[0.8125rem]">{ip}</span>,
  },
]

/** What changed, as words: `role viewer, email wren@…`. */
function detailsOf(detail: Row["detail"]): string {
  return Object.entries(detail)
    .filter(([, value]) => value !== null && value !== "")
    .map(
      ([name, value]) =>
        `${name.replaceAll("_", " ")} ${typeof value === "object" ? JSON.stringify(value) : value}`,
    )
    .join(", ")
}

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
        <span className="block max-w-96 min-w-56 text-soft [overflow-wrap:anywhere]">
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
    .map(([name, value]) => [name.replaceAll("_", " "), wordsOf(value)])
    .filter(([, words]) => words !== "")
    .map((pair) => pair.join(" "))
    .join(", ")
}

function wordsOf(value: unknown): string {
  if (value === null || value === undefined) return ""
  if (Array.isArray(value)) return value.map(wordsOf).join(" and ")
  return typeof value === "object" ? JSON.stringify(value) : String(value)
}

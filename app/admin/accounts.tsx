"use client"

import { type Column, DataTable } from "@/app/ui/data-table"
import type { Json } from "@/app/ui/json"
import { Day } from "@/app/ui/time"
import type { AccountForAdmin } from "@/lib/accounts"
import { planOf } from "@/lib/billing/plans"

type Row = Json<AccountForAdmin>

export function Accounts({ accounts }: { accounts: Row[] }) {
  return (
    <DataTable
      caption="Accounts"
      columns={columns}
      rows={accounts}
      fileName="accounts"
      empty="No account was opened yet."
      sortedBy={{ id: "since", desc: true }}
    />
  )
}

const columns: readonly Column<Row>[] = [
  {
    id: "name",
    header: "Name",
    value: ({ name, slug }) => `${name} ${slug}`,
    cell: ({ name, slug }) => (
      <>
        <span className="block font-medium">{name}</span>
        <span className="block font-mono text-xs text-soft">{slug}</span>
      </>
    ),
  },
  { id: "plan", header: "Plan", value: ({ plan }) => planOf(plan).name },
  {
    id: "status",
    header: "Status",
    value: ({ status }) => status,
    cell: ({ status }) => <span className={status === "active" ? "" : "text-danger"}>{status}</span>,
  },
  { id: "members", header: "People", numeric: true, value: ({ members }) => members },
  { id: "keys", header: "Keys", numeric: true, value: ({ keys_in_force }) => keys_in_force },
  {
    id: "units",
    header: "Live units",
    numeric: true,
    value: ({ live_units }) => live_units,
    cell: ({ live_units, unit_cap }) => (
      <>
        <span className="block">{live_units.toLocaleString("en")}</span>
        <span className="block text-xs text-soft">of {unit_cap.toLocaleString("en")}</span>
      </>
    ),
  },
  {
    id: "since",
    header: "Since",
    value: ({ created_at }) => created_at,
    cell: ({ created_at }) => <Day at={created_at} />,
  },
]

"use client"

import { useMemo } from "react"
import { type Column, DataTable } from "@/app/ui/data-table"
import type { Json } from "@/app/ui/json"
import { Day } from "@/app/ui/time"
import type { Member } from "@/lib/accounts"

type Row = Json<Member> & { readonly id: string }

const does = {
  owner: "Everything, with billing and team",
  developer: "Keys, explorer, usage, widgets",
  merchandiser: "Widgets and what shoppers ask",
  viewer: "Sees usage and invoices",
}

export function Team({ account, members }: { account: string; members: Json<Member>[] }) {
  const rows = useMemo(() => members.map((member) => ({ ...member, id: member.user_id })), [members])
  return (
    <DataTable
      caption="People of this account"
      columns={columns}
      rows={rows}
      fileName={`${account}-team`}
      empty="Nobody."
    />
  )
}

const columns: readonly Column<Row>[] = [
  {
    id: "name",
    header: "Name",
    value: ({ name }) => name,
    cell: ({ name, email }) => (
      <>
        <span className="block font-medium">{name}</span>
        <span className="block text-soft">{email}</span>
      </>
    ),
  },
  {
    id: "role",
    header: "Role",
    value: ({ role }) => role,
    cell: ({ role }) => (
      <>
        <span className="block first-letter:uppercase">{role}</span>
        <span className="block text-soft">{does[role]}</span>
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

"use client"

import { useQuery, useQueryClient } from "@tanstack/react-query"
import Link from "next/link"
import { useMemo, useState } from "react"
import { ask, detailOf } from "@/app/ui/api"
import { Button } from "@/app/ui/button"
import { type Column, DataTable } from "@/app/ui/data-table"
import type { Json } from "@/app/ui/json"
import { Notice } from "@/app/ui/notice"
import { PageHead } from "@/app/ui/sheet"
import { Failed } from "@/app/ui/states"
import { Day } from "@/app/ui/time"
import type { Invitation, Member } from "@/lib/team"
import { Invitations } from "./invitations"
import { InviteDialog } from "./invite"
import { LeaveDialog } from "./leave"
import { RemoveDialog } from "./remove"
import { RoleDialog } from "./role"
import { does } from "./roles"

export type Row = Json<Member> & { readonly id: string }

type Act = { kind: "invite" } | { kind: "leave" } | { kind: "role" | "remove"; member: Row }

/** The people of an account. Without `initialInvitations` one may look and leave, and no more. */
export function Team({
  account,
  lead,
  me,
  initial,
  initialInvitations,
  offerSecondFactor,
}: {
  account: string
  lead: string
  me: string
  initial: Json<Member>[]
  initialInvitations?: Json<Invitation>[]
  offerSecondFactor: boolean
}) {
  const path = `/api/portal/${account}/team`
  const manages = initialInvitations !== undefined
  const cache = useQueryClient()
  const { data, error, refetch } = useQuery({
    queryKey: [account, "team"],
    queryFn: () => ask<Json<Member>[]>("GET", path),
    initialData: initial,
  })
  const [act, setAct] = useState<Act>()
  const rows = useMemo(() => data.map((member) => ({ ...member, id: member.user_id })), [data])
  const done = () => {
    setAct(undefined)
    return cache.invalidateQueries({ queryKey: [account, "team"] })
  }
  const close = () => setAct(undefined)

  return (
    <>
      <PageHead
        title="Team"
        lead={lead}
        actions={
          manages && (
            <Button look="primary" onClick={() => setAct({ kind: "invite" })}>
              Invite someone
            </Button>
          )
        }
      />
      {offerSecondFactor && (
        <div className="mb-8">
          <Notice title="Your password alone opens this account">
            <Link className="link" href="/person/second-factor">
              Set up a second factor
            </Link>
            , and nobody who learns it comes in.
          </Notice>
        </div>
      )}
      {error && <Failed detail={detailOf(error)} onRetry={refetch} />}
      <DataTable
        caption="People of this account"
        columns={columns}
        rows={rows}
        fileName={`${account}-team`}
        empty="Nobody."
        actions={(member) =>
          member.user_id === me ? (
            <Button look="quiet" small onClick={() => setAct({ kind: "leave" })}>
              Leave
            </Button>
          ) : (
            manages && (
              <>
                <Button look="quiet" small onClick={() => setAct({ kind: "role", member })}>
                  Role<span className="sr-only"> of {member.name}</span>
                </Button>
                <Button look="quiet" small onClick={() => setAct({ kind: "remove", member })}>
                  Remove<span className="sr-only"> {member.name}</span>
                </Button>
              </>
            )
          )
        }
      />
      {manages && <Invitations account={account} path={path} initial={initialInvitations} />}
      {act?.kind === "invite" && <InviteDialog path={path} onDone={done} onClose={close} />}
      {act?.kind === "leave" && <LeaveDialog path={path} onClose={close} />}
      {act?.kind === "role" && <RoleDialog path={path} member={act.member} onDone={done} onClose={close} />}
      {act?.kind === "remove" && (
        <RemoveDialog path={path} member={act.member} onDone={done} onClose={close} />
      )}
    </>
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
        <span className="hidden text-soft sm:block">{does[role]}</span>
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

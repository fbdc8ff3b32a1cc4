"use client"

import { useMutation, useQuery, useQueryClient } from "@tanstack/react-query"
import { ask, detailOf } from "@/app/ui/api"
import { Button } from "@/app/ui/button"
import { type Column, DataTable } from "@/app/ui/data-table"
import type { Json } from "@/app/ui/json"
import { Notice } from "@/app/ui/notice"
import { Day, minuteOf } from "@/app/ui/time"
import type { Invitation } from "@/lib/team"

type Row = Json<Invitation>

/** Who was invited and has not come yet. */
export function Invitations({ account, path, initial }: { account: string; path: string; initial: Row[] }) {
  const cache = useQueryClient()
  const { data } = useQuery({
    queryKey: [account, "team", "invitations"],
    queryFn: () => ask<Row[]>("GET", `${path}/invitations`),
    initialData: initial,
  })
  const onSuccess = () => cache.invalidateQueries({ queryKey: [account, "team"] })
  const resend = useMutation({
    mutationFn: ({ id }: Row) => ask("POST", `${path}/invitations/${id}/resend`, {}),
    onSuccess,
  })
  const revoke = useMutation({
    mutationFn: ({ id }: Row) => ask("DELETE", `${path}/invitations/${id}`),
    onSuccess,
  })
  const problem = resend.error ?? revoke.error
  if (data.length === 0 && !problem) return null
  return (
    <section className="mt-12">
      <h2 className="mb-4 text-lg">Invited</h2>
      {problem && (
        <div className="mb-4">
          <Notice severity="danger" live>
            {detailOf(problem)}
          </Notice>
        </div>
      )}
      <p role="status" className="mb-2 text-sm text-soft empty:hidden">
        {resend.isSuccess && `Sent to ${resend.variables.email} again; the earlier link no longer works.`}
      </p>
      <DataTable
        caption="Open invitations"
        columns={columns}
        rows={data}
        fileName={`${account}-invitations`}
        empty="Nobody is invited."
        actions={(invitation) => (
          <>
            <Button
              look="quiet"
              small
              busy={resend.isPending && resend.variables.id === invitation.id}
              onClick={() => resend.mutate(invitation)}
            >
              Send again<span className="sr-only"> to {invitation.email}</span>
            </Button>
            <Button
              look="quiet"
              small
              busy={revoke.isPending && revoke.variables.id === invitation.id}
              onClick={() => revoke.mutate(invitation)}
            >
              Take back<span className="sr-only"> the invitation of {invitation.email}</span>
            </Button>
          </>
        )}
      />
    </section>
  )
}

const columns: readonly Column<Row>[] = [
  {
    id: "email",
    header: "E-mail",
    value: ({ email }) => email,
    cell: ({ email, invited_by }) => (
      <>
        <span className="block font-medium">{email}</span>
        <span className="block text-soft">by {invited_by}</span>
      </>
    ),
  },
  {
    id: "role",
    header: "Role",
    value: ({ role }) => role,
    cell: ({ role }) => <span className="inline-block first-letter:uppercase">{role}</span>,
  },
  {
    id: "sent",
    header: "Invited",
    value: ({ created_at }) => created_at,
    cell: ({ created_at }) => <Day at={created_at} />,
  },
  {
    id: "until",
    header: "Link",
    value: ({ expires_at }) => expires_at,
    cell: ({ expires_at }) =>
      Date.parse(expires_at) > Date.now() ? (
        <span title={minuteOf(expires_at)}>
          good until <Day at={expires_at} />
        </span>
      ) : (
        <span className="text-warning">too old, send it again</span>
      ),
  },
]

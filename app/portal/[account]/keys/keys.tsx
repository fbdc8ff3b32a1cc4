"use client"

import { useQuery, useQueryClient } from "@tanstack/react-query"
import { useState } from "react"
import { ask, detailOf } from "@/app/ui/api"
import { Button } from "@/app/ui/button"
import { type Column, DataTable } from "@/app/ui/data-table"
import { PageHead } from "@/app/ui/sheet"
import { Empty, Failed } from "@/app/ui/states"
import { Day } from "@/app/ui/time"
import { type Key, KeyState, kindOf, stateOf } from "./key-state"
import { NewKeyDialog } from "./new-key"
import { RevokeDialog } from "./revoke-key"
import { RotateDialog } from "./rotate-key"

interface Props {
  account: string
  initial: Key[]
  may: { create: boolean; rotate: boolean; revoke: boolean }
}

export function Keys({ account, initial, may }: Props) {
  const path = `/api/portal/${account}/keys`
  const cache = useQueryClient()
  const { data, error, refetch } = useQuery({
    queryKey: [account, "keys"],
    queryFn: () => ask<Key[]>("GET", path),
    initialData: initial,
  })
  const [act, setAct] = useState<{ kind: "new" } | { kind: "rotate" | "revoke"; item: Key }>()
  const [ended, setEnded] = useState(false)
  const now = Date.now()
  const works = (key: Key) => stateOf(key, now) === "in force" || stateOf(key, now) === "ends"
  const shown = data.filter((key) => ended || works(key))
  const done = () => cache.invalidateQueries({ queryKey: [account] })
  const close = () => setAct(undefined)

  return (
    <>
      <PageHead
        title="Keys"
        lead="A server key is a secret of your own servers. A browser key is public and works on the origins that you name."
        actions={
          may.create && (
            <Button look="primary" onClick={() => setAct({ kind: "new" })}>
              New key
            </Button>
          )
        }
      />
      {error && <Failed detail={detailOf(error)} onRetry={refetch} />}
      {data.length === 0 ? (
        <Empty
          title="No key yet"
          action={may.create && <Button onClick={() => setAct({ kind: "new" })}>Make the first key</Button>}
        >
          Every call carries a key. Begin with a sandbox key: it is free, and its answers are the real ones.
        </Empty>
      ) : (
        <DataTable
          caption="Keys of this account"
          columns={columns}
          rows={shown}
          fileName={`${account}-keys`}
          empty="No key works at the moment. Show the ended ones, or make a new key."
          toolbar={
            <label className="flex min-h-8 items-center gap-2 text-sm">
              <input type="checkbox" checked={ended} onChange={(event) => setEnded(event.target.checked)} />
              Show revoked and expired ones
            </label>
          }
          actions={(item) =>
            works(item) && (
              <>
                {may.rotate && !item.successor_id && (
                  <Button look="quiet" small onClick={() => setAct({ kind: "rotate", item })}>
                    Rotate<span className="sr-only"> {item.name}</span>
                  </Button>
                )}
                {may.revoke && (
                  <Button look="quiet" small onClick={() => setAct({ kind: "revoke", item })}>
                    Revoke<span className="sr-only"> {item.name}</span>
                  </Button>
                )}
              </>
            )
          }
        />
      )}
      {act?.kind === "new" && <NewKeyDialog path={path} onDone={done} onClose={close} />}
      {act?.kind === "rotate" && <RotateDialog path={path} item={act.item} onDone={done} onClose={close} />}
      {act?.kind === "revoke" && <RevokeDialog path={path} item={act.item} onDone={done} onClose={close} />}
    </>
  )
}

const columns: readonly Column<Key>[] = [
  {
    id: "name",
    header: "Name",
    value: ({ name }) => name,
    cell: ({ name, last4 }) => (
      <>
        <span className="block font-medium">{name}</span>
        <span className="font-mono text-xs text-soft">…{last4}</span>
      </>
    ),
  },
  {
    id: "kind",
    header: "Kind",
    value: kindOf,
    cell: (key) => (
      <>
        <span className="block">{kindOf(key)}</span>
        {key.origins.length > 0 && (
          <span className="block max-w-56 truncate text-xs text-soft" title={key.origins.join("\n")}>
            {key.origins[0]}
            {key.origins.length > 1 && ` and ${key.origins.length - 1} more`}
          </span>
        )}
      </>
    ),
  },
  {
    id: "scopes",
    header: "May",
    value: ({ scopes }) => scopes.join(" "),
    cell: ({ scopes }) =>
      scopes.length > 2 ? `${scopes[0]} and ${scopes.length - 1} more` : scopes.join(", "),
  },
  {
    id: "created",
    header: "Made",
    value: ({ created_at }) => created_at,
    cell: ({ created_at }) => <Day at={created_at} />,
  },
  {
    id: "used",
    header: "Last used",
    value: ({ last_used_at }) => last_used_at ?? "",
    cell: ({ last_used_at }) =>
      last_used_at ? <Day at={last_used_at} /> : <span className="text-soft">never</span>,
  },
  {
    id: "state",
    header: "State",
    value: (key) => stateOf(key, Date.now()),
    cell: (key) => <KeyState item={key} now={Date.now()} />,
  },
]

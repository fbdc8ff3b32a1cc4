"use client"

import { zodResolver } from "@hookform/resolvers/zod"
import { useQuery, useQueryClient } from "@tanstack/react-query"
import { useState } from "react"
import { useForm } from "react-hook-form"
import { keySearchInput } from "@/app/api/admin/schemas"
import { KeyState, kindOf } from "@/app/portal/[account]/keys/key-state"
import { ask, detailOf } from "@/app/ui/api"
import { Button } from "@/app/ui/button"
import { Input } from "@/app/ui/field"
import type { Json } from "@/app/ui/json"
import { Empty, Failed, Loading } from "@/app/ui/states"
import { minuteOf } from "@/app/ui/time"
import type { FoundKey } from "@/lib/keys"
import { RevokeDialog } from "./revoke"

export type Found = Json<FoundKey>

export function KeySearch() {
  const cache = useQueryClient()
  const [text, setText] = useState<string>()
  const [ending, setEnding] = useState<Found>()
  const { register, handleSubmit, formState } = useForm({
    resolver: zodResolver(keySearchInput),
    defaultValues: { text: "" },
  })
  const found = useQuery({
    queryKey: ["admin", "keys", text],
    queryFn: () => ask<Found[]>("GET", `/api/admin/keys?text=${encodeURIComponent(text ?? "")}`),
    enabled: text !== undefined,
    staleTime: 0,
  })

  return (
    <>
      <form
        onSubmit={handleSubmit((values) => setText(values.text))}
        noValidate
        className="flex max-w-2xl gap-3"
      >
        <Input
          {...register("text")}
          label="Id or last four characters"
          autoComplete="off"
          spellCheck={false}
          autoFocus
          className="grow"
          error={formState.errors.text?.message}
        />
        <Button type="submit" look="primary" className="mt-[1.875rem]">
          Find
        </Button>
      </form>
      <div className="mt-10" aria-live="polite">
        {found.isLoading && <Loading label="Looking for the key" rows={2} />}
        {found.error && <Failed detail={detailOf(found.error)} onRetry={found.refetch} />}
        {found.data?.length === 0 && (
          <Empty title="No key matches">
            Nothing has the id or the last characters “{text}”. Case counts.
          </Empty>
        )}
        <ul className="divide-y divide-line border-y border-line empty:hidden">
          {found.data?.map((item) => (
            <KeyRow key={item.id} item={item} onRevoke={() => setEnding(item)} />
          ))}
        </ul>
      </div>
      {ending && (
        <RevokeDialog
          item={ending}
          onClose={() => setEnding(undefined)}
          onDone={() => cache.invalidateQueries({ queryKey: ["admin", "keys"] })}
        />
      )}
    </>
  )
}

function KeyRow({ item, onRevoke }: { item: Found; onRevoke: () => void }) {
  const facts = [
    ["Account", `${item.account_name} (${item.account_slug})`],
    ["Kind", kindOf(item)],
    ["May", item.scopes.join(", ")],
    ["Origins", item.origins.join(", ") || "none needed"],
    ["Made", minuteOf(item.created_at)],
    ["Last used", item.last_used_at ? minuteOf(item.last_used_at) : "never"],
  ]
  return (
    <li className="grid gap-x-10 gap-y-4 py-6 lg:grid-cols-[16rem_minmax(0,1fr)_auto]">
      <div>
        <h2 className="text-lg">{item.name}</h2>
        <p className="mt-1 font-mono text-xs break-all text-soft">{item.id}</p>
        <p className="mt-2 text-sm">
          <KeyState item={item} now={Date.now()} />
        </p>
      </div>
      <dl className="grid grid-cols-[5.5rem_minmax(0,1fr)] content-start gap-x-4 gap-y-1 text-sm">
        {facts.map(([term, detail]) => (
          <div key={term} className="contents">
            <dt className="text-soft">{term}</dt>
            <dd>{detail}</dd>
          </div>
        ))}
      </dl>
      <div>
        {!item.revoked_at && (
          <Button look="danger" onClick={onRevoke}>
            Revoke<span className="sr-only"> {item.name}</span>
          </Button>
        )}
      </div>
    </li>
  )
}

"use client"

import { useQuery, useQueryClient } from "@tanstack/react-query"
import dynamic from "next/dynamic"
import { useEffect } from "react"
import { ask, detailOf } from "@/app/ui/api"
import { Failed, Loading } from "@/app/ui/states"

const loading = <Loading label="Loading the explorer" rows={8} />

// Half a megabyte that no other page needs.
const Operations = dynamic(() => import("./operations"), { ssr: false, loading: () => loading })

export function Explorer({ account }: { account: string }) {
  const cache = useQueryClient()
  const key = useQuery({
    queryKey: ["explorer-key", account],
    queryFn: () => ask<{ secret: string }>("POST", `/api/portal/${account}/explorer`, {}),
    staleTime: Number.POSITIVE_INFINITY,
  })
  // What was called here shows on the other pages without a wait.
  useEffect(() => () => void cache.invalidateQueries({ queryKey: [account] }), [cache, account])

  if (key.error) return <Failed detail={detailOf(key.error)} onRetry={key.refetch} />
  if (!key.data) return loading
  return (
    <>
      <p className="mb-6 border-l-2 border-action py-1 pl-4 text-sm">
        A sandbox key ending in <span className="font-mono">{key.data.secret.slice(-4)}</span> was made for
        this visit and is sent with every call. It is kept in this page only and ends in eight hours.
      </p>
      <Operations secret={key.data.secret} />
    </>
  )
}

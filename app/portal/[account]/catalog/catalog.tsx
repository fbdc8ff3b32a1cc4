"use client"

import { useMutation, useQuery, useQueryClient } from "@tanstack/react-query"
import { useMemo, useState } from "react"
import { ask, detailOf } from "@/app/ui/api"
import { Button } from "@/app/ui/button"
import { DataTable } from "@/app/ui/data-table"
import { Dialog } from "@/app/ui/dialog"
import { Notice } from "@/app/ui/notice"
import { PageHead, Section } from "@/app/ui/sheet"
import { Empty, Failed } from "@/app/ui/states"
import { columnsFor } from "./columns"
import { ImportDialog } from "./import-dialog"
import type { KindInfo, Part } from "./kind-info"
import { PartDialog } from "./part-dialog"
import { TankPanel } from "./tank-panel"

interface Props {
  account: string
  initial: Part[]
  kinds: readonly KindInfo[]
  csvColumns: readonly string[]
  mayManage: boolean
}

type Act = { kind: "add" } | { kind: "import" } | { kind: "edit" | "delete"; part: Part }

export function Catalog({ account, initial, kinds, csvColumns, mayManage }: Props) {
  const path = `/api/portal/${account}/catalog`
  const cache = useQueryClient()
  const queryKey = useMemo(() => [account, "catalog"], [account])
  const { data, error, refetch } = useQuery({
    queryKey,
    queryFn: () => ask<Part[]>("GET", path),
    initialData: initial,
  })
  const [act, setAct] = useState<Act>()
  const [kind, setKind] = useState("")
  const close = () => setAct(undefined)
  const reload = () => cache.invalidateQueries({ queryKey: [account] })
  const columns = useMemo(() => {
    const change = async (part: Part, body: object) => {
      const after = await ask<Part>("PATCH", `${path}/${part.id}`, body)
      cache.setQueryData<Part[]>(queryKey, (parts) =>
        parts?.map((each) => (each.id === after.id ? after : each)),
      )
    }
    return columnsFor(kinds, mayManage ? change : undefined)
  }, [kinds, mayManage, path, cache, queryKey])
  const shown = kind ? data.filter((part) => part.kind === kind) : data
  const present = kinds.filter(({ name }) => data.some((part) => part.kind === name))

  return (
    <>
      <PageHead
        title="Catalogue"
        lead={
          mayManage
            ? "The parts that you sell. The Bench, the widgets and the API recommend from them. Press Enter on a value to change it."
            : "The parts that the shop sells. You can see them; a merchandiser, developer or owner can change them."
        }
        actions={
          mayManage && (
            <>
              <Button onClick={() => setAct({ kind: "import" })}>Upload CSV</Button>
              <Button look="primary" onClick={() => setAct({ kind: "add" })}>
                Add a part
              </Button>
            </>
          )
        }
      />
      {error && <Failed detail={detailOf(error)} onRetry={refetch} />}
      {data.length === 0 ? (
        <Empty
          title="No part yet"
          action={mayManage && <Button onClick={() => setAct({ kind: "add" })}>Add the first part</Button>}
        >
          Add filters, reactors, diffusers and cylinders first: these four are matched to a customer’s tank. A
          CSV file brings them all at once.
        </Empty>
      ) : (
        <DataTable
          caption="Parts of the catalogue"
          columns={columns}
          rows={shown}
          fileName={`${account}-catalogue`}
          empty="No part of this kind yet."
          stacked
          toolbar={
            <select
              aria-label="Kind"
              value={kind}
              onChange={(event) => setKind(event.target.value)}
              className="min-h-8 rounded border border-edge bg-field px-2 text-sm"
            >
              <option value="">All kinds</option>
              {present.map(({ name, label }) => (
                <option key={name} value={name}>
                  {label}
                </option>
              ))}
            </select>
          }
          actions={
            mayManage
              ? (part) => (
                  <>
                    <Button look="quiet" small onClick={() => setAct({ kind: "edit", part })}>
                      Edit<span className="sr-only"> {part.name}</span>
                    </Button>
                    <Button look="quiet" small onClick={() => setAct({ kind: "delete", part })}>
                      Delete<span className="sr-only"> {part.name}</span>
                    </Button>
                  </>
                )
              : undefined
          }
        />
      )}
      <div className="mt-10">
        <Section
          title="What fits this tank?"
          note="Filters and reactors are solved in a loop of 3 m of hose. The Bench plans the whole system."
        >
          <TankPanel account={account} />
        </Section>
      </div>
      {(act?.kind === "add" || act?.kind === "edit") && (
        <PartDialog
          path={path}
          kinds={kinds}
          part={act.kind === "edit" ? act.part : undefined}
          onDone={reload}
          onClose={close}
        />
      )}
      {act?.kind === "delete" && <DeleteDialog path={path} part={act.part} onDone={reload} onClose={close} />}
      {act?.kind === "import" && (
        <ImportDialog path={path} columns={csvColumns} kinds={kinds} onDone={reload} onClose={close} />
      )}
    </>
  )
}

function DeleteDialog({
  path,
  part,
  onDone,
  onClose,
}: {
  path: string
  part: Part
  onDone: () => void
  onClose: () => void
}) {
  const remove = useMutation({
    mutationFn: () => ask("DELETE", `${path}/${part.id}`),
    onSuccess: () => {
      onDone()
      onClose()
    },
  })
  return (
    <Dialog
      open
      onClose={onClose}
      title={`Delete “${part.name}”?`}
      lead="The Bench, the widgets and the API stop recommending it at once. Stored reports keep what they say."
    >
      <div className="space-y-6">
        {remove.error && (
          <Notice severity="danger" live>
            {detailOf(remove.error)}
          </Notice>
        )}
        <div className="flex flex-wrap gap-3">
          <Button look="danger" busy={remove.isPending} onClick={() => remove.mutate()}>
            Delete the part
          </Button>
          <Button onClick={onClose}>Keep it</Button>
        </div>
      </div>
    </Dialog>
  )
}

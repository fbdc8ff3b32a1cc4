"use client"

import { useMutation } from "@tanstack/react-query"
import { useState } from "react"
import { ask, detailOf } from "@/app/ui/api"
import { Button } from "@/app/ui/button"
import { Dialog } from "@/app/ui/dialog"
import { download } from "@/app/ui/download"
import type { Json } from "@/app/ui/json"
import { Notice } from "@/app/ui/notice"
import type { ImportOutcome } from "@/lib/catalog"
import { csvOf } from "@/lib/csv"
import type { KindInfo } from "./kind-info"

type Outcome = Json<ImportOutcome>

const limit_bytes = 5 * 1024 * 1024
const mostListed = 100

/** A CSV file: chosen or dropped, tried first, then taken. The file is taken whole or not at all, even if one leaves. */
export function ImportDialog({
  path,
  columns,
  kinds,
  onDone,
  onClose,
}: {
  path: string
  columns: readonly string[]
  kinds: readonly KindInfo[]
  onDone: () => void
  onClose: () => void
}) {
  const [file, setFile] = useState<{ name: string; csv: string }>()
  const [refused, setRefused] = useState<string>()
  const [over, setOver] = useState(false)
  const send = (csv: string, dry_run: boolean, partial: boolean) =>
    ask<Outcome>("POST", `${path}/imports`, { csv, dry_run, partial })
  const tried = useMutation({ mutationFn: (csv: string) => send(csv, true, false) })
  const taken = useMutation({
    mutationFn: ({ csv, partial }: { csv: string; partial: boolean }) => send(csv, false, partial),
    onSuccess: onDone,
  })

  async function open(chosen: File | undefined) {
    if (!chosen) return
    taken.reset()
    tried.reset()
    setFile(undefined)
    if (chosen.size > limit_bytes) {
      setRefused(`${chosen.name} is bigger than 5 MiB. Split it into several files.`)
      return
    }
    setRefused(undefined)
    const csv = await chosen.text()
    setFile({ name: chosen.name, csv })
    tried.mutate(csv)
  }

  const failure = refused ?? (tried.error && detailOf(tried.error)) ?? (taken.error && detailOf(taken.error))
  const bad = tried.data ? new Set(tried.data.errors.map(({ row }) => row)).size : 0
  return (
    <Dialog
      open
      onClose={onClose}
      title="Upload a CSV file"
      lead="A row whose SKU you have already changes that part; any other row adds one. You see what will happen before anything does."
    >
      <div className="space-y-5">
        {!taken.data && (
          <>
            <label
              onDragOver={(event) => {
                event.preventDefault()
                setOver(true)
              }}
              onDragLeave={() => setOver(false)}
              onDrop={(event) => {
                event.preventDefault()
                setOver(false)
                open(event.dataTransfer.files[0])
              }}
              className={`block cursor-pointer border border-dashed px-5 py-6 focus-within:outline-2 focus-within:outline-action ${over ? "border-action bg-sunk" : "border-edge"}`}
            >
              <span className="font-medium">{file ? file.name : "Drop a file here, or choose one"}</span>
              <span className="mt-1 block text-sm text-soft">
                At most 5,000 rows and 5 MiB, decimal points, the columns of the template.
              </span>
              <input
                type="file"
                accept=".csv,text/csv"
                aria-label="CSV file"
                className="sr-only"
                onChange={(event) => {
                  open(event.target.files?.[0])
                  // The same file, mended, can be chosen again.
                  event.target.value = ""
                }}
              />
            </label>
            <Button
              small
              onClick={() => download("catalogue-template.csv", csvOf(columns, [exampleRow(columns)]))}
            >
              Download the template
            </Button>
          </>
        )}
        {failure && (
          <Notice severity="danger" live>
            {failure}
          </Notice>
        )}
        {(tried.isPending || taken.isPending) && (
          <div role="status">
            <progress className="w-full accent-(--action)" aria-label="Progress" />
            <p className="text-sm text-soft">
              {tried.isPending
                ? "The rows are being checked. Nothing changes yet."
                : "The rows are being taken. You may leave this page: the file is taken whole or not at all."}
            </p>
          </div>
        )}
        {tried.data && file && !taken.data && !taken.isPending && (
          <>
            <p aria-live="polite" className="font-medium">
              {count(tried.data.created, "part")} will be added, {tried.data.changed} changed
              {bad > 0 ? `; ${count(bad, "row")} cannot be taken.` : "."}
            </p>
            {bad > 0 && <BadRows errors={tried.data.errors} />}
            <GoodRows rows={tried.data.good} kinds={kinds} />
            <div className="flex flex-wrap gap-3">
              <Button
                look="primary"
                disabled={tried.data.good.length === 0}
                onClick={() => taken.mutate({ csv: file.csv, partial: bad > 0 })}
              >
                {bad > 0
                  ? `Take the ${count(tried.data.good.length, "good row")}`
                  : `Take ${count(tried.data.good.length, "row")}`}
              </Button>
              <Button onClick={onClose}>Cancel</Button>
            </div>
          </>
        )}
        {taken.data && (
          <>
            <Notice live title="Taken">
              {count(taken.data.created, "part")} added, {taken.data.changed} changed.
              {bad > 0 && ` ${count(bad, "row")} left out: mend them in the file and upload it again.`}
            </Notice>
            <Button look="primary" onClick={onClose}>
              Done
            </Button>
          </>
        )}
      </div>
    </Dialog>
  )
}

function BadRows({ errors }: { errors: Outcome["errors"] }) {
  return (
    <section aria-label="Rows that cannot be taken">
      <ul className="divide-y divide-line border-y border-line text-sm">
        {errors.slice(0, mostListed).map(({ row, column, value, detail }) => (
          <li key={`${row} ${column} ${detail}`} className="py-2">
            <p className="font-mono text-xs">
              Row {row}, {column}
              {value && <span className="text-danger"> “{value}”</span>}
            </p>
            <p>{detail}</p>
          </li>
        ))}
      </ul>
      {errors.length > mostListed && (
        <p className="mt-1 text-sm text-soft">{errors.length - mostListed} more. Mend these first.</p>
      )}
    </section>
  )
}

function GoodRows({ rows, kinds }: { rows: Outcome["good"]; kinds: readonly KindInfo[] }) {
  if (rows.length === 0) return null
  return (
    <details className="text-sm">
      <summary className="link">What will happen, row by row</summary>
      <ul className="mt-2 divide-y divide-line border-y border-line">
        {rows.slice(0, mostListed).map(({ row, kind, name, sku, changes }) => (
          <li key={row} className="flex flex-wrap gap-x-3 py-1.5">
            <span className="font-mono text-xs leading-6 text-soft">Row {row}</span>
            <span className={changes ? "text-warning" : "text-action"}>{changes ? "changes" : "adds"}</span>
            <span>{name}</span>
            <span className="text-soft">
              {kinds.find((each) => each.name === kind)?.label}
              {sku && `, ${sku}`}
            </span>
          </li>
        ))}
      </ul>
      {rows.length > mostListed && <p className="mt-1 text-soft">and {rows.length - mostListed} more rows</p>}
    </details>
  )
}

function count(number: number, word: string): string {
  return `${number.toLocaleString("en")} ${word}${number === 1 ? "" : "s"}`
}

const example: Readonly<Record<string, string>> = {
  kind: "filter",
  name: "Canister 1000 (an example: replace this row)",
  sku: "C-1000",
  url: "https://shop.example/canister-1000",
  price: "189.00",
  currency: "USD",
  hose_inner_diameter_mm: "16",
  pump_curve: "0:1.6;500:1.2;1000:0",
}

function exampleRow(columns: readonly string[]): string[] {
  return columns.map((column) => example[column] ?? "")
}

"use client"

import { useCallback, useDeferredValue, useEffect, useMemo, useState, useSyncExternalStore } from "react"
import { useForm, useWatch } from "react-hook-form"
import { Loading } from "@/app/ui/states"
import { BenchContext, type BenchShared } from "./bench-context"
import { type BenchUnits, readingOf } from "./bench-units"
import type { BenchForm } from "./fields"
import { BenchHead } from "./head"
import { Inputs } from "./inputs"
import { keepSheet, keepUnits, keptSheet } from "./keep"
import { PrintSheet } from "./print-sheet"
import { Results } from "./results"
import { inUnits, type Sheet, startSheet, withValues } from "./sheet"
import { SummaryLine } from "./summary-line"
import { UnitChoice } from "./unit-choice"
import { useQuiet } from "./use-quiet"
import { type Problems, type Worked, workOut } from "./work-out"

export interface BenchProps {
  readonly account: string
  readonly shop: string
  /** What saving a plan costs. */
  readonly reportUnits: number
  readonly may: { readonly save: boolean; readonly stock: boolean }
}

/** The whole plan for the customer at the counter. It lives in the browser: what is kept there decides what it shows. */
export function Bench(props: BenchProps) {
  const isBrowser = useSyncExternalStore(
    () => () => undefined,
    () => true,
    () => false,
  )
  return isBrowser ? <OpenBench {...props} /> : <Loading label="The bench is being set up" rows={12} />
}

const noProblems: Problems = {}

function OpenBench({ account, shop, may, reportUnits }: BenchProps) {
  const [first] = useState(() => keptSheet(account))
  const [{ exact, units }, setRest] = useState<Omit<Sheet, "form">>(first)
  const [isWide] = useState(() => window.matchMedia("(min-width: 64rem)").matches)
  const form = useForm<BenchForm>({ defaultValues: first.form })
  const values = useWatch({ control: form.control }) as BenchForm
  const sheet = useMemo<Sheet>(() => ({ form: values, exact, units }), [values, exact, units])

  // Typing stays ahead of the engine: a plan takes some milliseconds, and React drops those that typing overtakes.
  const settled = useDeferredValue(sheet)
  const outcome = useMemo(() => workOut(settled), [settled])
  const [last, setLast] = useState<Worked | undefined>(
    () => outcome.worked ?? workOut(startSheet(units)).worked,
  )
  if (outcome.worked && outcome.worked !== last) setLast(outcome.worked)
  const worked = outcome.worked ?? last
  const problems = useQuiet(outcome.problems ?? noProblems, outcome.problems ? 600 : 0)
  const isStale = Object.keys(problems).length > 0

  useEffect(() => keepSheet(account, sheet), [account, sheet])

  const write = useCallback(
    (next: Sheet) => {
      form.reset(next.form)
      setRest(next)
    },
    [form],
  )
  const reading = useMemo(() => readingOf(units), [units])
  // Stays the same while someone types, so that a keystroke draws its own field anew and no other.
  const shared = useMemo<BenchShared>(
    () => ({
      form,
      units,
      reading,
      problems,
      fill(filled, chosen = {}) {
        const next = withValues({ form: form.getValues(), exact, units }, filled)
        write({ ...next, form: { ...next.form, ...chosen } })
      },
    }),
    [form, units, reading, problems, exact, write],
  )

  function changeUnits(next: BenchUnits) {
    keepUnits(next)
    write(inUnits({ form: form.getValues(), exact, units }, next))
  }

  return (
    <BenchContext value={shared}>
      <div data-wide className="print:hidden">
        <BenchHead
          account={account}
          worked={isStale ? undefined : worked}
          maySave={may.save}
          reportUnits={reportUnits}
          onNew={() => write(startSheet(units))}
        />
        {worked && <SummaryLine worked={worked} />}
        <div className="grid items-start gap-x-9 lg:grid-cols-[18rem_minmax(0,1fr)]">
          <form
            aria-label="The customer's tank"
            onSubmit={(event) => event.preventDefault()}
            className="lg:sticky lg:top-12 lg:max-h-[calc(100dvh-3rem)] lg:-ml-1 lg:overflow-y-auto lg:px-1 lg:pb-6"
          >
            <UnitChoice units={units} onChange={changeUnits} />
            <Inputs allOpen={isWide} />
          </form>
          {worked && (
            <div
              id="results"
              className={`@container min-w-0 scroll-mt-14 transition-opacity ${isStale ? "opacity-60" : ""}`}
            >
              <Results account={account} worked={worked} reading={reading} mayStock={may.stock} />
            </div>
          )}
        </div>
      </div>
      {worked && <PrintSheet shop={shop} worked={worked} reading={reading} />}
    </BenchContext>
  )
}

"use client"

import { LevelWord } from "@/app/ui/level-word"
import { CautionMark } from "@/app/ui/marks"
import { figures } from "@/lib/units/figures"
import { useBench } from "./bench-context"
import { type FieldName, fieldOf } from "./fields"
import type { Worked } from "./work-out"

/** The result in one line that stays in sight; while something is wrong, what to mend, in the same line. */
export function SummaryLine({ worked }: { worked: Worked }) {
  const { problems } = useBench()
  const [wrong] = Object.entries(problems)
  return (
    <div className="sticky top-0 z-20 -mx-5 mb-5 flex h-12 items-center gap-x-4 overflow-hidden border-y border-line bg-paper px-5 whitespace-nowrap lg:mx-0 lg:px-0">
      {wrong ? <Wrong field={wrong[0]} detail={wrong[1]} /> : <Line worked={worked} />}
    </div>
  )
}

function Line({ worked }: { worked: Worked }) {
  const { ph, co2, method, reactor, dosing } = worked.plan.result
  return (
    <a href="#results" className="flex min-w-0 grow items-center gap-x-4 sm:gap-x-6">
      <span>
        <span className="sr-only">To the results: </span>
        <span className="text-sm text-soft">pH </span>
        <span className="font-mono font-medium" data-testid="set-point">
          {ph.ph.toFixed(2)}
        </span>
      </span>
      <span className="flex items-center gap-2 text-sm">
        <span className="font-mono font-medium">{co2.target_co2_mg_l}</span>
        <span className="text-soft">mg/L</span>
        <LevelWord level={co2.level} />
      </span>
      <span className="min-w-0 truncate text-sm">
        {method.name === "inline_reactor" ? `reactor ${reactor.verdict}` : method.label}
      </span>
      <span className="hidden text-sm text-soft md:inline">
        opens <span className="font-mono text-ink">{dosing.open_before_lights_min.toFixed(0)}</span> min
        before the lights
      </span>
      <span className="hidden text-sm text-soft xl:inline">
        <span className="font-mono text-ink">{figures(dosing.daily_use_g_day, 2)}</span> g a day
      </span>
    </a>
  )
}

function Wrong({ field, detail }: { field: string; detail: string | undefined }) {
  const { form } = useBench()
  const name = field === "sheet" ? undefined : (field as FieldName)

  function mend(at: FieldName) {
    const input = document.querySelector(`[name="${at}"]`)
    for (let open = input?.closest("details"); open; open = open.parentElement?.closest("details")) {
      open.open = true
    }
    form.setFocus(at, { shouldSelect: true })
  }

  return (
    <p role="status" className="flex min-w-0 grow items-center gap-2 text-sm">
      <CautionMark className="size-4 text-danger" />
      <span className="min-w-0 truncate">
        <span className="font-semibold text-danger">The last good result is shown.</span>{" "}
        {name ? fieldOf(name).label : "The plan"}: {detail}
      </span>
      {name && (
        <button type="button" className="link ml-auto shrink-0" onClick={() => mend(name)}>
          Mend it
        </button>
      )}
    </p>
  )
}

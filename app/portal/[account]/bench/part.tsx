"use client"

import type { ReactNode } from "react"
import { Cautions } from "@/app/ui/cautions"
import { classNames } from "@/app/ui/class-names"
import { DownMark } from "@/app/ui/marks"
import type { PlanSection } from "@/lib/plan/system-plan"
import { type Reading, written, writtenRange } from "@/lib/units/format"
import { type QuantityName, quantities } from "@/lib/units/quantities"
import type { Worked } from "./work-out"

/** One part of the result, with the cautions that concern it beside it. It may be folded away. */
export function Part({
  title,
  cautions = [],
  isOpen = true,
  className,
  children,
}: {
  title: string
  cautions?: Worked["plan"]["cautions"]
  isOpen?: boolean
  className?: string
  children: ReactNode
}) {
  return (
    <details open={isOpen} className={classNames("group/part border-t border-line py-6", className)}>
      <summary className="flex list-none items-center justify-between [&::-webkit-details-marker]:hidden">
        <h2 className="text-xl">{title}</h2>
        <DownMark className="size-4 text-soft group-open/part:rotate-180" />
      </summary>
      <div className="mt-5 space-y-6">
        {children}
        {cautions.length > 0 && <Cautions cautions={cautions} />}
      </div>
    </details>
  )
}

/** Cautions that the engine set beside these parts of its result, without those that stand beside `elsewhere`. */
export function cautionsBeside(
  { plan }: Worked,
  sections: readonly PlanSection[],
  extra: readonly string[] = [],
  elsewhere: readonly PlanSection[] = [],
) {
  const of = (names: readonly PlanSection[]) => names.flatMap((name) => plan.result.caution_sections[name])
  const codes = new Set([...of(sections), ...extra])
  const left = new Set(of(elsewhere))
  return plan.cautions.filter(({ code }) => codes.has(code) && !left.has(code))
}

/** Codes that the plan as a whole adds, by the part that they stand beside. */
export const planCodes = {
  reactor: ["reactor_unsuitable", "hose_clamps", "mains_near_water"],
  day: ["timer_climbs_all_day"],
  pressure: ["check_valve"],
} as const

/** A value with its unit, for a `Figure`. */
export function amount(reading: Reading, value: number, quantity: QuantityName, digits = 3) {
  const { figure, unit } = written(value, quantities[quantity].unit, reading, digits)
  return { value: figure, unit }
}

/** A value with its unit in a sentence. */
export function said(reading: Reading, value: number, quantity: QuantityName, digits = 3): string {
  const { figure, unit } = written(value, quantities[quantity].unit, reading, digits)
  return `${figure} ${unit}`.trim()
}

/** An interval with its unit. */
export function span(
  reading: Reading,
  low: number,
  high: number,
  quantity: QuantityName,
  digits = 2,
): string {
  const { figure, unit } = writtenRange(low, high, quantities[quantity].unit, reading, digits)
  return `${figure} ${unit}`.trim()
}

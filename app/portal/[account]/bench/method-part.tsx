"use client"

import { Button } from "@/app/ui/button"
import { CloseMark, TickMark } from "@/app/ui/marks"
import type { Fit } from "@/lib/plan/method-choice"
import type { Reading } from "@/lib/units/format"
import { useBench } from "./bench-context"
import { Part } from "./part"
import type { Worked } from "./work-out"

const fits: Record<Fit, { word: string; tone: string }> = {
  recommended: { word: "recommended", tone: "text-action" },
  possible: { word: "possible", tone: "text-soft" },
  unsuitable: { word: "unsuitable here", tone: "text-danger" },
}

/** The three ways to get gas into this tank, each with what speaks for it and against it. */
export function MethodPart({ worked }: { worked: Worked; reading: Reading }) {
  const { form } = useBench()
  const { method } = worked.plan.result
  return (
    <Part title="Method">
      <ul className="divide-y divide-line border-y border-line">
        {method.options.map(({ name, label, fit, for: pros, against }) => (
          <li key={name} className="grid gap-x-6 gap-y-3 py-4 @min-[44rem]:grid-cols-[11rem_minmax(0,1fr)]">
            <div className="flex flex-wrap items-baseline justify-between gap-2 @min-[44rem]:block">
              <h3 className="font-semibold first-letter:uppercase">{label}</h3>
              <p className={`text-sm font-medium ${fits[fit].tone}`}>{fits[fit].word}</p>
              {name === method.name ? (
                <p className="mt-2 text-sm text-soft">this plan</p>
              ) : (
                <Button small className="mt-2" onClick={() => form.setValue("method", name)}>
                  Plan with it
                </Button>
              )}
            </div>
            <div className="grid gap-x-6 gap-y-3 text-sm @min-[36rem]:grid-cols-2">
              <Reasons of="For" reasons={pros} />
              <Reasons of="Against" reasons={against} />
            </div>
          </li>
        ))}
      </ul>
    </Part>
  )
}

function Reasons({ of, reasons }: { of: "For" | "Against"; reasons: readonly string[] }) {
  const Mark = of === "For" ? TickMark : CloseMark
  const tone = of === "For" ? "text-action" : "text-warning"
  return (
    <div>
      <p className="sr-only">{of} it</p>
      <ul className="space-y-1.5">
        {reasons.map((reason) => (
          <li key={reason} className="flex gap-2">
            <Mark className={`mt-1 size-3 ${tone}`} />
            <span>{reason}</span>
          </li>
        ))}
        {reasons.length === 0 && <li className="text-soft">Nothing speaks {of.toLowerCase()} it.</li>}
      </ul>
    </div>
  )
}

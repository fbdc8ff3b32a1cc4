"use client"

import type { KeyboardEvent } from "react"
import { Input, Select, TextArea } from "@/app/ui/field"
import { quantities } from "@/lib/units/quantities"
import { useBench } from "./bench-context"
import { fieldSymbol } from "./bench-units"
import { type ChoiceName, choices, type FieldName, fieldOf } from "./fields"

/** One typed field: its unit inside it, what is wrong under it; the arrow keys step a number. */
export function FieldInput({ name, wide = false }: { name: FieldName; wide?: boolean }) {
  const { form, units, problems } = useBench()
  const { label, quantity, kind, step = 1 } = fieldOf(name)
  const unit = quantity && kind === undefined ? fieldSymbol(quantities[quantity].unit, units) : undefined
  const className = wide ? "col-span-2" : "min-w-0"
  if (kind === "curve") {
    const shown = `${fieldSymbol("L/h", units)} and ${fieldSymbol("m", units)}`
    return (
      <TextArea
        {...form.register(name)}
        label={<Label text={label} />}
        hint={`A flow and a head on each line, in ${shown}`}
        rows={6}
        spellCheck={false}
        autoComplete="off"
        error={problems[name]}
        className={className}
      />
    )
  }

  function stepBy(event: KeyboardEvent<HTMLInputElement>) {
    const direction = { ArrowUp: 1, ArrowDown: -1 }[event.key]
    const value = Number(form.getValues(name).replace(",", "."))
    if (direction === undefined || kind === "clock" || !Number.isFinite(value)) return
    event.preventDefault()
    const next = Math.max(0, value + direction * step)
    form.setValue(name, String(Number(next.toPrecision(6))), { shouldDirty: true })
  }

  return (
    <Input
      {...form.register(name)}
      label={<Label text={label} />}
      unit={unit || undefined}
      type={kind === "clock" ? "time" : "text"}
      inputMode={kind === "clock" ? undefined : kind === "count" ? "numeric" : "decimal"}
      autoComplete="off"
      onKeyDown={stepBy}
      error={problems[name]}
      className={className}
    />
  )
}

/** One choice of a few. */
export function ChoiceInput({ name, wide = false }: { name: ChoiceName; wide?: boolean }) {
  const { form } = useBench()
  const { label, options } = choices[name]
  return (
    <Select
      {...form.register(name)}
      label={<Label text={label} />}
      className={wide ? "col-span-2" : "min-w-0"}
    >
      {Object.entries(options).map(([value, text]) => (
        <option key={value} value={value}>
          {text}
        </option>
      ))}
    </Select>
  )
}

function Label({ text }: { text: string }) {
  return <span className="block truncate text-sm">{text}</span>
}

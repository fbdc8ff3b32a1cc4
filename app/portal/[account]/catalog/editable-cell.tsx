"use client"

import { useEffect, useId, useRef, useState } from "react"
import { ApiProblem, detailOf } from "@/app/ui/api"
import { FieldError } from "@/app/ui/field"
import type { Read } from "./part-values"

/**
 * A value of a table that becomes a field where it stands: Enter or a click opens it, Enter keeps it, Escape leaves it as
 * it was. What is refused stays as it was typed, with what is wrong under it.
 */
export function EditableCell<Value>({
  label,
  text,
  unit = "",
  read,
  save,
  numeric = false,
}: {
  label: string
  text: string
  unit?: string
  read: (text: string) => Read<Value>
  save: (value: Value) => Promise<unknown>
  numeric?: boolean
}) {
  const [draft, setDraft] = useState<string>()
  const [problem, setProblem] = useState<string>()
  const [busy, setBusy] = useState(false)
  const opener = useRef<HTMLButtonElement>(null)
  const returns = useRef(false)
  const id = useId()

  useEffect(() => {
    if (draft !== undefined || !returns.current) return
    returns.current = false
    opener.current?.focus()
  }, [draft])

  function leave() {
    setProblem(undefined)
    setDraft(undefined)
  }

  async function keep() {
    if (draft === undefined || busy) return
    if (draft === text) return leave()
    const found = read(draft)
    if ("problem" in found) return setProblem(found.problem)
    setBusy(true)
    try {
      await save(found.value)
      leave()
    } catch (error) {
      const first = error instanceof ApiProblem ? error.problem.errors?.[0]?.detail : undefined
      setProblem(first ?? detailOf(error))
    } finally {
      setBusy(false)
    }
  }

  if (draft === undefined) {
    return (
      <button
        ref={opener}
        type="button"
        aria-label={`${label}: ${text ? `${text}${unit && ` ${unit}`}` : "empty"}. Edit`}
        onClick={() => setDraft(text)}
        className={`-mx-1.5 min-h-7 rounded border border-transparent px-1.5 text-left hover:border-edge ${numeric ? "whitespace-nowrap" : ""}`}
      >
        {text ? (
          <>
            {text}
            {unit && <span className="text-soft"> {unit}</span>}
          </>
        ) : (
          <span className="text-soft">—</span>
        )}
      </button>
    )
  }
  return (
    <span className="inline-block w-full min-w-28">
      <input
        // biome-ignore lint/a11y/noAutofocus: the person has just opened this field
        autoFocus
        aria-label={label}
        aria-invalid={problem ? true : undefined}
        aria-describedby={problem ? id : undefined}
        aria-busy={busy || undefined}
        value={draft}
        inputMode={numeric ? "decimal" : undefined}
        onFocus={(event) => event.target.select()}
        onChange={(event) => setDraft(event.target.value)}
        onBlur={keep}
        onKeyDown={(event) => {
          if (event.key !== "Enter" && event.key !== "Escape") return
          event.preventDefault()
          returns.current = true
          if (event.key === "Enter") keep()
          else leave()
        }}
        className="min-h-8 w-full rounded border border-edge bg-field px-1.5 text-ink aria-invalid:border-danger"
      />
      <FieldError id={id} message={problem} />
    </span>
  )
}

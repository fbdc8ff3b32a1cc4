"use client"

import { createContext, useContext } from "react"
import type { UseFormReturn } from "react-hook-form"
import type { Reading } from "@/lib/units/format"
import type { BenchUnits } from "./bench-units"
import type { BenchForm, FieldName } from "./fields"
import type { FieldValue } from "./sheet"
import type { Problems } from "./work-out"

/** What every part of the Bench shares. */
export interface BenchShared {
  readonly form: UseFormReturn<BenchForm>
  readonly units: BenchUnits
  readonly reading: Reading
  /** What is wrong, once the typing has paused. */
  readonly problems: Problems
  /** Writes values of the engine into the form, in the units of the sheet. */
  fill(values: Partial<Record<FieldName, FieldValue>>, chosen?: Partial<BenchForm>): void
}

export const BenchContext = createContext<BenchShared | null>(null)

export function useBench(): BenchShared {
  const shared = useContext(BenchContext)
  if (!shared) throw new Error("A part of the Bench stands outside of it")
  return shared
}

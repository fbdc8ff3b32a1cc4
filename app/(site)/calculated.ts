import { OutOfDomain } from "@/lib/units/out-of-domain"

/** The number that a field holds; NaN when it holds none. Either decimal mark. */
export function numberIn(text: string): number {
  const plain = text.trim().replace(",", ".")
  return plain === "" ? Number.NaN : Number(plain)
}

/** What a calculation gave, or what is wrong with its input and at which field. */
export type Calculated<Result> =
  | { readonly result: Result; readonly problem?: undefined }
  | { readonly result?: undefined; readonly problem: { readonly field: string; readonly detail: string } }

/** Runs the engine; a refusal of the input is an answer, anything else is a fault. */
export function calculated<Result>(run: () => Result): Calculated<Result> {
  try {
    return { result: run() }
  } catch (error) {
    if (error instanceof OutOfDomain) return { problem: { field: error.field, detail: error.detail } }
    throw error
  }
}

import { carbonate, carbonatePublished } from "./carbonate"
import { flow } from "./flow"
import type { ReferenceFormat } from "./format"
import { gas } from "./gas"
import { flowGasPublished } from "./published"

/** Every kind of reference file, a line each. */
export const formats: readonly ReferenceFormat[] = [
  carbonate,
  carbonatePublished,
  flow,
  gas,
  flowGasPublished,
]

import { carbonate, carbonatePublished } from "./carbonate"
import { flow } from "./flow"
import type { ReferenceFormat } from "./format"

/** Every kind of reference file, a line each. */
export const formats: readonly ReferenceFormat[] = [carbonate, carbonatePublished, flow]

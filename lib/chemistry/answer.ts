import { ENGINE_VERSION } from "./engine-version"
import { type Source, type SourceId, sources } from "./sources"

export type Severity = "info" | "warning" | "danger"

/** Something that the person must know beside the result. `message` carries the numbers it speaks of. */
export interface Caution {
  readonly code: string
  readonly severity: Severity
  readonly message: string
}

/** Something the calculation took for granted because the input did not say. */
export interface Assumption {
  readonly code: string
  readonly message: string
}

/** What every function of the engine that answers a question of the trade returns. */
export interface Answer<Result extends object, Uncertainty extends object = Record<string, never>> {
  readonly result: Result
  readonly uncertainty: Uncertainty
  readonly cautions: readonly Caution[]
  readonly assumptions: readonly Assumption[]
  readonly method: Method
}

export interface Method {
  readonly name: string
  readonly version: string
  readonly sources: readonly Source[]
}

/** The method of an answer: its name in words, the engine's version, and the sources behind its numbers. */
export function method(name: string, sourceIds: readonly SourceId[]): Method {
  return { name, version: ENGINE_VERSION, sources: sourceIds.map((id) => sources[id]) }
}

import { carbonateSources } from "./sources-carbonate"
import { flowSources } from "./sources-flow"
import { gasSources } from "./sources-gas"

/** Where a number of the engine comes from. Every room of the engine cites from this one table. */
export interface Source {
  readonly title: string
  readonly year: number
  readonly detail: string
}

export const sources = {
  ...carbonateSources,
  ...gasSources,
  ...flowSources,
} as const satisfies Record<string, Source>

export type SourceId = keyof typeof sources

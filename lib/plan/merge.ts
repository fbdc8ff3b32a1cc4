import type { Assumption, Caution, Method, Severity } from "@/lib/chemistry/answer"
import { ENGINE_VERSION } from "@/lib/chemistry/engine-version"
import type { Source } from "@/lib/chemistry/sources"

/** What an answer of the engine says beside its result. */
export interface Said {
  readonly cautions: readonly Caution[]
  readonly assumptions: readonly Assumption[]
  readonly method: Method
}

const SEVERITIES: readonly Severity[] = ["danger", "warning", "info"]

/** All cautions of several answers, one for each code: the most severe, and those first that are most severe. */
export function mergedCautions(sections: readonly (readonly Caution[])[]): Caution[] {
  const byCode = new Map<string, Caution>()
  for (const caution of sections.flat()) {
    const known = byCode.get(caution.code)
    if (known === undefined || rank(caution) < rank(known)) byCode.set(caution.code, caution)
  }
  return [...byCode.values()].sort((a, b) => rank(a) - rank(b))
}

/** All assumptions, one for each code. */
export function mergedAssumptions(sections: readonly (readonly Assumption[])[]): Assumption[] {
  return [...new Map(sections.flat().map((assumption) => [assumption.code, assumption])).values()]
}

/** One method that cites the sources of several, each once. */
export function mergedMethod(name: string, methods: readonly Method[]): Method {
  const sources = new Set<Source>(methods.flatMap((method) => method.sources))
  return { name, version: ENGINE_VERSION, sources: [...sources] }
}

function rank({ severity }: Caution): number {
  return SEVERITIES.indexOf(severity)
}

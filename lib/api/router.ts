import type { AnyOperation } from "./define-operation"

export interface Match {
  readonly operation: AnyOperation
  readonly params: Readonly<Record<string, string>>
}

export interface Router {
  /** The operation behind a method and a path below `/api/v1`; the methods offered, where only the method is wrong. */
  find(method: string, path: string): Match | { readonly allowed: readonly string[] } | undefined
}

/** Finds operations by their path. Paths without parameters win over those with. */
export function createRouter(registry: readonly AnyOperation[]): Router {
  const fixed = new Map<string, AnyOperation[]>()
  const patterns: { segments: string[]; operation: AnyOperation }[] = []
  for (const operation of registry) {
    if (operation.path.includes("{")) {
      patterns.push({ segments: operation.path.split("/"), operation })
    } else {
      fixed.set(operation.path, [...(fixed.get(operation.path) ?? []), operation])
    }
  }

  return {
    find(method, path) {
      const candidates: Match[] = (fixed.get(path) ?? []).map((operation) => ({ operation, params: {} }))
      if (candidates.length === 0) {
        const segments = path.split("/")
        for (const pattern of patterns) {
          const params = parametersOf(pattern.segments, segments)
          if (params) candidates.push({ operation: pattern.operation, params })
        }
      }
      const match = candidates.find(({ operation }) => operation.method === method)
      if (match) return match
      return candidates.length > 0
        ? { allowed: candidates.map(({ operation }) => operation.method) }
        : undefined
    },
  }
}

function parametersOf(pattern: string[], segments: string[]): Record<string, string> | undefined {
  if (pattern.length !== segments.length) return undefined
  const params: Record<string, string> = {}
  for (const [index, part] of pattern.entries()) {
    const segment = segments[index] as string
    if (part.startsWith("{")) params[part.slice(1, -1)] = segment
    else if (part !== segment) return undefined
  }
  return params
}

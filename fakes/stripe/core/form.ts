import { invalid } from "./errors"

export type FormValue = string | FormValue[] | { [key: string]: FormValue }

const MAX_DEPTH = 8

/**
 * Decodes `a[b]=1&c[0][d]=2&e[]=3`, the manner in which version 1 of the API takes nested values.
 * An object whose keys are 0, 1, … in order becomes an array. Values stay strings.
 *
 * @throws ApiError 400 on brackets that do not close, on a name used as both value and object, on depth > 8
 */
export function decodeForm(text: string): Record<string, FormValue> {
  const root = new Map<string, Node>()
  for (const [name, value] of new URLSearchParams(text)) {
    put(root, pathOf(name), value, name)
  }
  return Object.fromEntries([...root].map(([key, node]) => [key, settle(node)]))
}

type Node = string | Map<string, Node>

function pathOf(name: string): string[] {
  const match = /^([^[\]]+)((?:\[[^[\]]*\])*)$/.exec(name)
  if (!match) throw invalid(`Invalid parameter name: ${name}`, name)
  const path = [match[1]!, ...[...match[2]!.matchAll(/\[([^[\]]*)\]/g)].map((part) => part[1]!)]
  if (path.length > MAX_DEPTH) throw invalid(`Nested too deeply: ${name}`, name)
  return path
}

function put(into: Map<string, Node>, path: string[], value: string, name: string): void {
  const [head, ...rest] = path
  const key = head === "" ? String(into.size) : head!
  if (rest.length === 0) {
    if (into.get(key) instanceof Map) throw invalid(`Invalid object: ${name}`, name)
    into.set(key, value)
    return
  }
  const child = into.get(key) ?? new Map<string, Node>()
  if (typeof child === "string") throw invalid(`Invalid object: ${name}`, name)
  into.set(key, child)
  put(child, rest, value, name)
}

function settle(node: Node): FormValue {
  if (typeof node === "string") return node
  const entries = [...node]
  if (entries.every(([key], index) => key === String(index))) return entries.map(([, child]) => settle(child))
  return Object.fromEntries(entries.map(([key, child]) => [key, settle(child)]))
}

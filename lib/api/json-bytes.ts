/** Lists from this length on are written item by item. */
const LONG = 16

/**
 * An answer as JSON: text, or its UTF-8 bytes where it holds a long list. V8 takes several times as long to make bytes
 * of one text of hundreds of kilobytes as of its items one after another.
 */
export function jsonOf(output: unknown): string | Uint8Array {
  if (typeof output !== "object" || output === null || Array.isArray(output)) return JSON.stringify(output)
  const members = Object.entries(output)
  if (!members.some(([, value]) => Array.isArray(value) && value.length >= LONG))
    return JSON.stringify(output)
  const parts: Buffer[] = []
  const write = (text: string) => parts.push(Buffer.from(text))
  let before = "{"
  for (const [name, value] of members) {
    if (value === undefined) continue
    if (Array.isArray(value) && value.length > 0) {
      write(`${before}${JSON.stringify(name)}:[`)
      value.forEach((item, index) => {
        write(`${index === 0 ? "" : ","}${JSON.stringify(item) ?? "null"}`)
      })
      write("]")
    } else {
      write(`${before}${JSON.stringify(name)}:${JSON.stringify(value)}`)
    }
    before = ","
  }
  write("}")
  return Buffer.concat(parts)
}

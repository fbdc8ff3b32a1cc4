const loopback = new Set(["localhost", "127.0.0.1", "[::1]"])

/**
 * Whether the text can stand on an allow-list: scheme, host and port, nothing more; https, or http on loopback; at
 * most the left-most label a wildcard, above at least two more labels. @source PLATFORM 2.9
 */
export function isAllowedOrigin(text: string): boolean {
  const plain = text.replace("://*.", "://wildcard.")
  const url = parse(plain)
  if (!url || url.origin !== plain || url.hostname.includes("*")) return false
  if (plain !== text && url.hostname.split(".").length < 3) return false
  return url.protocol === "https:" || (url.protocol === "http:" && loopback.has(url.hostname))
}

/** Whether a page's origin is on the list. Compared part by part as URLs, never as the start of a text. */
export function originMatches(origin: string, allowed: readonly string[]): boolean {
  const page = parse(origin)
  if (!page || page.origin !== origin) return false
  return allowed.some((entry) => {
    if (!entry.includes("://*.")) return entry === origin
    const pattern = parse(entry.replace("://*.", "://wildcard."))
    if (!pattern || pattern.protocol !== page.protocol || pattern.port !== page.port) return false
    const [label, ...rest] = page.hostname.split(".")
    return label !== "" && rest.join(".") === pattern.hostname.slice("wildcard.".length)
  })
}

function parse(text: string): URL | undefined {
  return URL.canParse(text) ? new URL(text) : undefined
}

/**
 * Where to go after signing in: a path of this site, or the portal when what was asked for is anything else.
 *
 * @source PLATFORM 6.7: parsed as a URL, neither `//` nor a backslash, so that no link of ours leads elsewhere
 */
export function nextPath(asked: string | string[] | null | undefined, otherwise = "/portal"): string {
  if (typeof asked !== "string" || !/^\/(?![/\\])[^\\\p{Cc}]*$/u.test(asked)) return otherwise
  const base = "https://tarnwright.invalid"
  if (!URL.canParse(asked, base)) return otherwise
  const url = new URL(asked, base)
  return url.origin === base ? url.pathname + url.search + url.hash : otherwise
}

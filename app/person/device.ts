// In this order: most browsers name others beside themselves.
const browsers: readonly [RegExp, string][] = [
  [/\bEdg(e|A|iOS)?\//, "Edge"],
  [/\bOPR\//, "Opera"],
  [/\b(Firefox|FxiOS)\//, "Firefox"],
  [/\b(Chrome|CriOS|HeadlessChrome)\//, "Chrome"],
  [/\bSafari\//, "Safari"],
]
const systems: readonly [RegExp, string][] = [
  [/\biPhone\b/, "iPhone"],
  [/\biPad\b/, "iPad"],
  [/\bAndroid\b/, "Android"],
  [/\bWindows\b/, "Windows"],
  [/\bMac OS X\b/, "macOS"],
  [/\bCrOS\b/, "ChromeOS"],
  [/\bLinux\b/, "Linux"],
]

/** What a browser says of itself, in words that its owner recognises: `Firefox on Windows`. */
export function deviceOf(user_agent: string | null): string {
  const nameIn = (table: readonly [RegExp, string][]) =>
    table.find(([pattern]) => pattern.test(user_agent ?? ""))?.[1]
  const [browser, system] = [nameIn(browsers), nameIn(systems)]
  if (!browser && !system) return "An unknown device"
  return [browser ?? "A browser", system].filter(Boolean).join(" on ")
}

/**
 * The environment of a process that we start: where programs are and how to speak, what it is given, and nothing
 * else of the shell's, so that a run is the same whoever starts it.
 */
export function environment(given: Readonly<Record<string, string>> = {}): NodeJS.ProcessEnv {
  const names = ["PATH", "HOME", "LANG", "TZ", "TMPDIR", "REDIS_URL"]
  const inherited = names.flatMap((name) => {
    const value = process.env[name]
    return value === undefined ? [] : [[name, value] as const]
  })
  return { NODE_ENV: "production", ...Object.fromEntries(inherited), ...given }
}

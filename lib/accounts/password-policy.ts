export const PASSWORD_MIN = 15
export const PASSWORD_MAX = 200

/**
 * What is wrong with a password, in words that say how to mend it; undefined when nothing is.
 *
 * Length is what counts: no rules of composition (ASVS 6.2.1, 6.2.5). Refused are those that a guesser tries first at
 * this length: one piece repeated, a run along the alphabet, the digits or a keyboard row, and the person's own data.
 */
export function passwordProblem(
  password: string,
  about: { email: string; name?: string },
): string | undefined {
  const length = [...password].length
  if (length < PASSWORD_MIN) {
    return `Use at least ${PASSWORD_MIN} characters; a few words that only you would put together do well.`
  }
  if (length > PASSWORD_MAX) return `Use at most ${PASSWORD_MAX} characters.`
  const plain = password.toLowerCase().replace(/[^\p{L}\p{N}]/gu, "")
  if (/^(.{1,6})\1+.{0,5}$/u.test(plain)) return "This repeats one short piece. Use different words."
  if (runLength(plain) >= plain.length / 2) return "This follows the alphabet or a keyboard row. Use words."
  const own = ["tarnwright", "password", ...about.email.split(/[@.]/), ...(about.name ?? "").split(/\s+/)]
  const rest = own
    .map((word) => word.toLowerCase())
    .filter((word) => word.length >= 3)
    .sort((a, b) => b.length - a.length)
    .reduce((text, word) => text.replaceAll(word, ""), plain)
  if (rest.length < 8) return "This is mostly your own name or address, or ours. Use other words."
  return undefined
}

const rows = ["abcdefghijklmnopqrstuvwxyz", "01234567890", "qwertyuiop", "asdfghjkl", "zxcvbnm", "qwertzuiop"]
const runs = rows.flatMap((row) => [row, [...row].reverse().join("")])

/** Characters of the text that lie in runs of four or more neighbours. */
function runLength(text: string): number {
  let inRuns = 0
  let start = 0
  for (let end = 2; end <= text.length + 1; end++) {
    const piece = text.slice(start, end)
    if (end <= text.length && runs.some((run) => run.includes(piece))) continue
    const length = end - 1 - start
    if (length >= 4) inRuns += length
    start = end - 1
  }
  return inRuns
}

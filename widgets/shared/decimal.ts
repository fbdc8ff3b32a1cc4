/**
 * The number that a person typed, or null when it is none. Takes a comma or a point as the decimal mark in every
 * locale, since no quantity here needs a mark for thousands, and the digits of a Japanese keyboard.
 */
export function parseDecimal(text: string): number | null {
  const plain = text.normalize("NFKC").trim().replace(",", ".").replace("\u2212", "-")
  return /^[+-]?(\d+\.?\d*|\.\d+)$/.test(plain) ? Number(plain) : null
}

/** How tall a framed widget is: the one message between the frame and its page. @source PLATFORM 4.14 */
export interface HeightMessage {
  readonly type: "tarnwright:height"
  readonly height: number
}

export const heightLimits = { min: 100, max: 4_000 } as const

/** The message that says a height in CSS pixels. */
export function heightMessage(height: number): HeightMessage {
  const { min, max } = heightLimits
  return { type: "tarnwright:height", height: Math.min(max, Math.max(min, Math.ceil(height))) }
}

/** The height that a message says, or null when it is none of ours. */
export function heightIn(data: unknown): number | null {
  if (typeof data !== "object" || data === null) return null
  const { type, height } = data as Partial<HeightMessage>
  const { min, max } = heightLimits
  return type === "tarnwright:height" && Number.isInteger(height) && height! >= min && height! <= max
    ? height!
    : null
}

/** Round numbers from 0 to at least `top`, at most `count` steps apart: 1, 2 or 5 times a power of ten. */
export function ticksTo(top: number, count = 4): number[] {
  const rough = Math.max(top, 1) / count
  const power = 10 ** Math.floor(Math.log10(rough))
  const step = [1, 2, 5, 10].map((factor) => factor * power).find((each) => each >= rough) ?? rough
  const whole = Math.max(1, step)
  return Array.from({ length: Math.ceil(Math.max(top, 1) / whole) + 1 }, (_, index) => index * whole)
}

/** Maps a range of values to a range of pixels. */
export function linear(
  from: readonly [number, number],
  to: readonly [number, number],
): (value: number) => number {
  const slope = (to[1] - to[0]) / (from[1] - from[0])
  return (value) => to[0] + (value - from[0]) * slope
}

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

/** Round numbers that lie between two values, about `count` steps apart: 1, 2 or 5 times a power of ten. */
export function ticksWithin(from: number, to: number, count = 5): number[] {
  const rough = (to - from) / count
  if (!(rough > 0)) return [from]
  const power = 10 ** Math.floor(Math.log10(rough))
  const step = [1, 2, 5, 10].map((factor) => factor * power).find((each) => each >= rough * 0.999) ?? rough
  const first = Math.ceil(from / step - 1e-9)
  const last = Math.floor(to / step + 1e-9)
  // Through a product and not a sum, and rounded, so that 0.6 is not 0.6000000000000001.
  return Array.from({ length: last - first + 1 }, (_, index) =>
    Number(((first + index) * step).toPrecision(12)),
  )
}

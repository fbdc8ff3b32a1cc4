import { createShrinkRate, DISSOLVED_BELOW_MM, type DissolvingInto } from "@/lib/gas/bubble-dissolution"
import { bubbleRise } from "@/lib/gas/bubble-rise"
import { findRoot } from "@/lib/numeric/find-root"
import { figures } from "@/lib/units/figures"
import { OutOfDomain } from "@/lib/units/out-of-domain"

/** Length that uneven flow and the inlet's jet ask for over the calm length. @source engineeringJudgement */
export const JETTING_FACTOR = 1.5

export interface CarryOver {
  /** The largest bubble that the water can sweep down: it rises as fast as the water falls. */
  readonly start_diameter_mm: number
  readonly time_s: number
  /** Length of calm body in which it dissolves, m. */
  readonly length_m: number
}

/** What the bubbles of one reactor do in water that flows down past them. */
export interface BubbleTravel {
  /** How long a body must be to let no bubble out: the largest swept bubble travels ∫(v − u)dt. */
  readonly carryOver: (velocity_m_s: number) => CarryOver
  /** The greatest water speed at which a body of a calm length lets no bubble out, m/s. */
  readonly greatestVelocity: (length_m: number) => number
  /**
   * Share of the gas that leaves a body of a calm length as bubbles, 0-1: the volume that the largest swept bubble
   * still has at the end, over that of the feed bubble.
   */
  readonly escapedFraction: (velocity_m_s: number, length_m: number) => number
}

/**
 * The travel of bubbles up to a feed bubble, at most 3 mm, in one water; 5-40 °C.
 *
 * A small bubble's course is the end of a large one's, so one pass over the diameters serves every question. Rise and
 * mass transfer: cliftGraceWeber1978, frossling1938. Times and lengths within 5e-4 of the differential equation, the
 * escaped share within 0.5 %: the formula of the rise has kinks that Simpson's rule rounds off.
 * Throws {@link OutOfDomain} when the water holds so much CO2 already that bubbles do not dissolve in it.
 */
export function bubbleTravel(feed_mm: number, into: DissolvingInto): BubbleTravel {
  const { water } = into
  const course = dissolutionCourse(feed_mm, into)
  const feedRise = bubbleRise(feed_mm, water)
  const slowest = bubbleRise(DISSOLVED_BELOW_MM, water)

  const swept = (velocity_m_s: number) => {
    if (velocity_m_s >= feedRise) return feed_mm
    if (velocity_m_s <= slowest) return DISSOLVED_BELOW_MM
    return diameterWhere(feed_mm, (diameter_mm) => bubbleRise(diameter_mm, water) - velocity_m_s)
  }
  const lengthWhenHeld = (diameter_mm: number) => {
    const { time_s, climb_m } = course(diameter_mm)
    return bubbleRise(diameter_mm, water) * time_s - climb_m
  }

  return {
    carryOver: (velocity_m_s) => {
      const start_diameter_mm = swept(velocity_m_s)
      const { time_s, climb_m } = course(start_diameter_mm)
      return { start_diameter_mm, time_s, length_m: velocity_m_s * time_s - climb_m }
    },
    greatestVelocity: (length_m) => {
      if (lengthWhenHeld(feed_mm) <= length_m) {
        const { time_s, climb_m } = course(feed_mm)
        return (length_m + climb_m) / time_s
      }
      const diameter_mm = diameterWhere(feed_mm, (held_mm) => lengthWhenHeld(held_mm) - length_m)
      return bubbleRise(diameter_mm, water)
    },
    escapedFraction: (velocity_m_s, length_m) => {
      const start_mm = swept(velocity_m_s)
      const start = course(start_mm)
      const beyond = (diameter_mm: number) => {
        const { time_s, climb_m } = course(diameter_mm)
        return length_m - (velocity_m_s * (start.time_s - time_s) - (start.climb_m - climb_m))
      }
      if (beyond(DISSOLVED_BELOW_MM) >= 0) return 0
      return (diameterWhere(start_mm, beyond) / feed_mm) ** 3
    },
  }
}

interface Course {
  /** Seconds until the bubble is dissolved. */
  readonly time_s: number
  /** Metres that it rises against the water meanwhile. */
  readonly climb_m: number
}

/** Panels of Simpson's rule, each a constant ratio of diameters. */
const PANELS = 24

/** Course of a bubble of any diameter up to the feed bubble: the sum over the panels below it, and a part of one. */
function dissolutionCourse(feed_mm: number, into: DissolvingInto): (diameter_mm: number) => Course {
  const pace = paceOf(into)
  const ratio = Math.log(feed_mm / DISSOLVED_BELOW_MM) / PANELS
  const nodes: { readonly pace: Pace; readonly course: Course }[] = []
  let last = { pace: pace(DISSOLVED_BELOW_MM), course: { time_s: 0, climb_m: 0 } }
  for (let i = 1; i <= PANELS; i++) {
    nodes.push(last)
    const end = pace(DISSOLVED_BELOW_MM * Math.exp(i * ratio))
    last = { pace: end, course: addPanel(last, pace((last.pace.diameter_mm + end.diameter_mm) / 2), end) }
  }
  return (diameter_mm) => {
    const panel = Math.floor(Math.log(diameter_mm / DISSOLVED_BELOW_MM) / ratio)
    const start = nodes[Math.min(panel, PANELS - 1)]!
    return addPanel(start, pace((start.pace.diameter_mm + diameter_mm) / 2), pace(diameter_mm))
  }
}

/** A bubble's pace at a diameter: how long it takes to lose a millimetre, and how far it rises meanwhile. */
interface Pace {
  readonly diameter_mm: number
  readonly s_per_mm: number
  readonly m_per_mm: number
}

function paceOf(into: DissolvingInto): (diameter_mm: number) => Pace {
  const rate = createShrinkRate(into)
  return (diameter_mm) => {
    const shrinking = rate(diameter_mm)
    if (!(shrinking > 0)) {
      throw new OutOfDomain(
        "inlet_co2_mg_l",
        `Water with ${figures(into.co2_mg_l, 3)} mg/L CO2 dissolves no more of it at this pressure. Check the value.`,
      )
    }
    const s_per_mm = 1 / shrinking
    return { diameter_mm, s_per_mm, m_per_mm: bubbleRise(diameter_mm, into.water) * s_per_mm }
  }
}

function addPanel(start: { readonly pace: Pace; readonly course: Course }, middle: Pace, end: Pace): Course {
  const { pace, course } = start
  const sixth = (end.diameter_mm - pace.diameter_mm) / 6
  return {
    time_s: course.time_s + sixth * (pace.s_per_mm + 4 * middle.s_per_mm + end.s_per_mm),
    climb_m: course.climb_m + sixth * (pace.m_per_mm + 4 * middle.m_per_mm + end.m_per_mm),
  }
}

/** The diameter below which a rising function of it is negative. */
function diameterWhere(high_mm: number, f: (diameter_mm: number) => number): number {
  return findRoot({ f, low: DISSOLVED_BELOW_MM, high: high_mm, tolerance: 1e-9 })
}

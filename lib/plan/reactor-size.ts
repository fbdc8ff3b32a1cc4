import { boreVelocity, contactVolume, flowAtVelocity } from "@/lib/flow/reactor"
import type { ReactorInput } from "@/lib/flow/reactor-input"

/** Bores in which reactor bodies are sold, mm. Common practice, no source. */
const BODY_SIZES_MM = [40, 50, 60, 75, 90, 110] as const

/** Water speed in the body at which 35 to 40 cm hold every bubble, m/s. From the carry-over of `bubbleTravel`. */
const CALM_M_S = 0.1
const LEAST_LENGTH_MM = 350
const LENGTH_STEP_MM = 50

/**
 * The smallest reactor that holds its bubbles at a flow and dissolves a feed: a body in which the water falls at no
 * more than 0.1 m/s, long enough for the contact that the feed asks for. A flow too big for any body goes in part
 * around it.
 */
export function sizeReactor(p: { readonly flow_l_h: number; readonly feed_mg_min: number }): ReactorInput {
  const widest_mm = BODY_SIZES_MM.at(-1)!
  const body_diameter_mm =
    BODY_SIZES_MM.find((diameter_mm) => boreVelocity(p.flow_l_h, diameter_mm) <= CALM_M_S) ?? widest_mm
  const area_dm2 = (Math.PI / 4) * (body_diameter_mm / 100) ** 2
  const contact_mm = (contactVolume(p.feed_mg_min) / area_dm2) * 100
  const body_length_mm = Math.max(LEAST_LENGTH_MM, LENGTH_STEP_MM * Math.ceil(contact_mm / LENGTH_STEP_MM))
  const through = flowAtVelocity(CALM_M_S, body_diameter_mm) / p.flow_l_h
  return {
    body_diameter_mm,
    body_length_mm: Math.min(body_length_mm, LONGEST_MM),
    ...(through < 1 ? { bypass_fraction: Math.min(1 - through, MOST_BYPASS) } : {}),
  }
}

/** The ends of what a body may be, as the engine takes it. */
const LONGEST_MM = 1500
const MOST_BYPASS = 0.95

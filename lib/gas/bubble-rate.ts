import { type Answer, type Caution, method } from "@/lib/chemistry/answer"
import { checkBounds } from "@/lib/units/bounds"
import { figures } from "@/lib/units/figures"
import { OutOfDomain } from "@/lib/units/out-of-domain"
import { quantities } from "@/lib/units/quantities"
import { bubbleVolume, counterGasDensity, counterWater, milligramsPerMillilitre } from "./bubble-count"

/** Exactly one of the three rates. */
export interface BubbleRateInput {
  readonly outlet_diameter_mm: number
  readonly bubbles_per_s?: number | undefined
  readonly feed_ml_min?: number | undefined
  readonly feed_mg_min?: number | undefined
  readonly temperature_c: number
  readonly counter_pressure_bar: number
}

export interface BubbleRate {
  readonly bubbles_per_s: number
  readonly feed_ml_min: number
  readonly feed_mg_min: number
  readonly bubble_volume_ul: number
  readonly mg_per_bubble: number
  readonly syringe_10_ml_s: number
}

/** The rate that was given has no spread; the other one has. */
export interface BubbleRateUncertainty {
  readonly feed_low_mg_min: number
  readonly feed_high_mg_min: number
  readonly bubbles_per_s_low: number
  readonly bubbles_per_s_high: number
}

/**
 * Bubbles a second against gas by mass and by volume, for a counter filled with water.
 *
 * Volume of a bubble from `bubbleVolume`, its mass from the gas's density at the counter's pressure. ±25 %. Throws
 * `OutOfDomain` unless exactly one rate is given, within its bounds.
 */
export function bubbleRate(input: BubbleRateInput): Answer<BubbleRate, BubbleRateUncertainty> {
  checkBounds(input, quantities)
  const { outlet_diameter_mm, temperature_c, counter_pressure_bar } = input
  const bubble_volume_ul = bubbleVolume(outlet_diameter_mm, counterWater(temperature_c))
  const mg_per_bubble = bubble_volume_ul * counterGasDensity({ counter_pressure_bar, temperature_c })
  const ml = milligramsPerMillilitre(temperature_c)
  const feed_mg_min = massFeed(input, mg_per_bubble, ml)
  const bubbles_per_s = feed_mg_min / 60 / mg_per_bubble
  const feed_ml_min = feed_mg_min / ml
  const counted = input.bubbles_per_s !== undefined
  const [low, high] = [1 - SPREAD, 1 + SPREAD]
  return {
    result: {
      bubbles_per_s,
      feed_ml_min,
      feed_mg_min,
      bubble_volume_ul,
      mg_per_bubble,
      syringe_10_ml_s: 600 / feed_ml_min,
    },
    uncertainty: {
      feed_low_mg_min: counted ? feed_mg_min * low : feed_mg_min,
      feed_high_mg_min: counted ? feed_mg_min * high : feed_mg_min,
      bubbles_per_s_low: counted ? bubbles_per_s : bubbles_per_s / high,
      bubbles_per_s_high: counted ? bubbles_per_s : bubbles_per_s / low,
    },
    cautions: bubbleCautions(input, { bubbles_per_s, mg_per_bubble, bubble_volume_ul, feed_ml_min }),
    assumptions: [
      {
        code: "counter_liquid",
        message:
          "The counter is filled with water and its tube points up or sideways. Oil or glycol halve the bubble, and a pointed or soft tube changes it.",
      },
      {
        code: "counter_pressure",
        message: `The gas in the counter stands at ${figures(counter_pressure_bar, 2)} bar above the air. Behind a needle valve that is what reactor or diffuser push back, about 0.1 to 0.3 bar for a reactor and 2 to 2.5 for a diffuser, not what the reducer is set to.`,
      },
    ],
    method: method("Bubble volume from the tube, mass from the gas's density", [
      "tate1864",
      "landoOakley1967",
      "tsonopoulos1974",
      "iapws1976",
      "kell1975",
    ]),
  }
}

/** Relative spread of a bubble's volume between counters of the same bore. Judgement. */
const SPREAD = 0.25

function massFeed(input: BubbleRateInput, mg_per_bubble: number, mg_per_ml: number): number {
  const { bubbles_per_s, feed_ml_min, feed_mg_min } = input
  const feeds = [
    bubbles_per_s === undefined ? undefined : bubbles_per_s * 60 * mg_per_bubble,
    feed_ml_min === undefined ? undefined : feed_ml_min * mg_per_ml,
    feed_mg_min,
  ].filter((feed) => feed !== undefined)
  if (feeds.length === 1) return feeds[0]!
  const given = feeds.length === 0 ? "Give" : "You gave more than one rate. Give"
  throw new OutOfDomain("feed_mg_min", `${given} one of bubbles a second, mL/min and mg/min.`)
}

/** Bubbles a second that an eye still counts. Common practice, no source. */
const COUNTABLE_PER_S = 4
/** mm of bore from which the correlation was measured. @source landoOakley1967, x > 0.3 in water */
const CORRELATED_FROM_MM = 1.9
/** bar of a diffuser's back-pressure, to compare with. */
const DIFFUSER_BAR = 2

function bubbleCautions(
  { temperature_c, outlet_diameter_mm }: BubbleRateInput,
  rate: Pick<BubbleRate, "bubbles_per_s" | "mg_per_bubble" | "bubble_volume_ul" | "feed_ml_min">,
): Caution[] {
  const densityAt = (counter_pressure_bar: number) =>
    counterGasDensity({ counter_pressure_bar, temperature_c })
  const cautions: Caution[] = [
    {
      code: "bubbles_do_not_compare",
      severity: "warning",
      message: `A bubble here carries ${figures(rate.mg_per_bubble, 2)} mg; in a counter at ${DIFFUSER_BAR} bar the same bubble carries ${figures(rate.bubble_volume_ul * densityAt(DIFFUSER_BAR), 2)} mg, ${figures(densityAt(DIFFUSER_BAR) / densityAt(0), 2)} times that of one at no pressure. Never carry a bubble rate over from another system.`,
    },
    {
      code: "starting_point",
      severity: "info",
      message: `Counters differ by 25 % either way: start here and trim by the drop checker over days. To measure instead, collect 10 mL under water in a syringe: it takes ${figures(600 / rate.feed_ml_min, 2)} s.`,
    },
  ]
  if (rate.bubbles_per_s > COUNTABLE_PER_S) {
    cautions.push({
      code: "stream_of_bubbles",
      severity: "info",
      message: `${figures(rate.bubbles_per_s, 2)} bubbles a second is a stream that nobody can count. Use a flow meter for ${figures(rate.feed_ml_min, 2)} mL/min.`,
    })
  }
  if (outlet_diameter_mm < CORRELATED_FROM_MM) {
    cautions.push({
      code: "narrow_tube",
      severity: "info",
      message: `The bubble's volume was measured for tubes from ${CORRELATED_FROM_MM} mm; ${figures(outlet_diameter_mm, 2)} mm is stretched from there.`,
    })
  }
  return cautions
}

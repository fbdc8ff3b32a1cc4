import type { Caution, Severity } from "@/lib/chemistry/answer"
import { livestock, localRules, raiseSlowly } from "@/lib/chemistry/cautions"
import { CO2_MG_PER_MOL } from "@/lib/units/chemistry"
import { figures } from "@/lib/units/figures"
import type { Uncontrolled } from "./feed"
import type { PreparedTank } from "./tank-input"

/** mg/L that a feed may lead to before it must not run unattended, and before it is deadly. Judgement. */
export const UNATTENDED_MG_L = 35
const DEADLY_MG_L = 60

/** What the person must know about a feed: what it does unthrottled, and why a short lead needs a surplus. */
export function feedCautions(
  tank: PreparedTank,
  feed: Uncontrolled & {
    readonly feed_ratio: number
    readonly lead_min: number
    readonly hold_only_lights_on_co2_mg_l: number
    readonly hold_only_close_co2_mg_l: number
  },
): Caution[] {
  return [
    unthrottled(feed, tank.target_co2_mg_l),
    {
      code: "lead_needs_surplus",
      severity: "info",
      message: `A short lead is bought with feed, not with the reactor: 1 to 1.5 h takes 4 to 5 times the hold feed on a rippled surface, then throttling. At the hold feed alone, on a timer that opens ${figures(feed.lead_min, 2)} min before the lights, this tank holds ${figures(feed.hold_only_lights_on_co2_mg_l, 2)} mg/L when the lights come on and ${figures(feed.hold_only_close_co2_mg_l, 2)} when the gas closes, not ${figures(tank.target_co2_mg_l, 3)}.`,
    },
    ...(feed.saturated ? [saturated] : []),
    tankLivestock(tank, tank.target_co2_mg_l),
    raiseSlowly,
    localRules,
  ]
}

/** The caution about the animals at a level that the tank may reach. */
export function tankLivestock(tank: PreparedTank, co2_high_mg_l: number): Caution {
  const pco2_uatm = (1e6 * tank.system.pressurePerCo2 * co2_high_mg_l) / CO2_MG_PER_MOL
  return livestock({ co2_high_mg_l, pco2_uatm })
}

/** The gas runs out during the day: the computed level was kept at zero. */
export const plantsTakeAll: Caution = {
  code: "plants_take_all",
  severity: "warning",
  message:
    "After the gas closes the plants would take more CO2 than the water holds, so CO2 was kept at zero for that time. Close the gas later, or take a smaller plant uptake.",
}

/** What a feed reaches when nothing throttles it: always said, from `info` to `danger`. */
export function unthrottled(
  feed: Omit<Uncontrolled, "saturated"> & { readonly feed_ratio: number },
  target_co2_mg_l: number,
): Caution {
  const limit = feed.uncontrolled_limit_co2_mg_l
  const severity: Severity = limit > DEADLY_MG_L ? "danger" : limit > UNATTENDED_MG_L ? "warning" : "info"
  const reached = `This feed is ${figures(feed.feed_ratio, 2)} times what holds ${figures(target_co2_mg_l, 3)} mg/L. With nothing to throttle it CO2 reaches ${figures(feed.uncontrolled_co2_mg_l, 2)} mg/L when the gas closes, and ${figures(limit, 2)} if it never closes.`
  const advice =
    severity === "danger"
      ? " That kills livestock: run it only behind a pH controller that is gated by the light and limits how long the valve stays open."
      : severity === "warning"
        ? " Do not run it unattended without a controller or a sure timer."
        : " The pressure and the needle valve still drift: check the level every day at first."
  return { code: "unthrottled_feed", severity, message: reached + advice }
}

export const saturated: Caution = {
  code: "saturated",
  severity: "danger",
  message:
    "Unthrottled, this feed would fill the water with as much CO2 as it can hold under pure gas; the level given for it is that limit.",
}

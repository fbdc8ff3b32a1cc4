import { figures } from "@/lib/units/figures"
import { OutOfDomain } from "@/lib/units/out-of-domain"
import { holdFeed } from "./balance"
import { milligramsPerMillilitre } from "./bubble-count"
import type { PreparedTank } from "./tank-input"

/** The feed, as a person knows it: by mass, by a flow meter, or as a multiple of the hold feed. */
export interface FeedInput {
  readonly feed_mg_min?: number | undefined
  readonly feed_ml_min?: number | undefined
  /** Used when neither of the others is given. */
  readonly feed_ratio: number
}

export interface Feed {
  readonly feed_mg_min: number
  readonly feed_ml_min: number
  readonly feed_ratio: number
  readonly hold_feed_mg_min: number
}

/** mg/L a minute: a feed that lifts a tank faster cannot be controlled, nor does the water take it. Judgement. */
const FASTEST_RISE_MG_L_MIN = 10

/** Throws `OutOfDomain` on a feed given twice, or one that no tank of this volume could take. */
export function resolveFeed(tank: PreparedTank, input: FeedInput): Feed {
  if (input.feed_mg_min !== undefined && input.feed_ml_min !== undefined) {
    throw new OutOfDomain("feed_ml_min", "Give the feed by mass or by volume, not both.")
  }
  const hold_feed_mg_min = holdFeed(tank.balance, tank.target_co2_mg_l, true)
  const ml = milligramsPerMillilitre(tank.system.temperature_c)
  const byVolume = input.feed_ml_min === undefined ? undefined : input.feed_ml_min * ml
  const feed_mg_min = input.feed_mg_min ?? byVolume ?? input.feed_ratio * hold_feed_mg_min
  const rise = (tank.balance.dissolution_efficiency * feed_mg_min) / tank.balance.volume_l
  if (rise > FASTEST_RISE_MG_L_MIN) {
    const field =
      input.feed_mg_min !== undefined ? "feed_mg_min" : byVolume !== undefined ? "feed_ml_min" : "feed_ratio"
    throw new OutOfDomain(
      field,
      `This feed would add ${figures(rise, 3)} mg/L each minute, too fast for any controller. Give at most ${FASTEST_RISE_MG_L_MIN} mg/L each minute.`,
    )
  }
  return {
    feed_mg_min,
    feed_ml_min: feed_mg_min / ml,
    feed_ratio: feed_mg_min / hold_feed_mg_min,
    hold_feed_mg_min,
  }
}

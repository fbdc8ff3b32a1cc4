import type { Objects } from "../core/state"

type Recurring = NonNullable<Objects["price"]["recurring"]>

const DAY_S = 86_400

/**
 * End of the billing period that holds `moment`, counted from the anchor so that the 31st comes back after a short
 * month. Unix seconds.
 */
export function periodEnd(anchor: number, recurring: Recurring, moment: number): number {
  for (let index = 1; ; index += 1) {
    const end = shifted(anchor, recurring, index)
    if (end > moment) return end
  }
}

/** `anchor` plus `times` intervals; months are clamped to their last day. */
export function shifted(anchor: number, recurring: Recurring, times: number): number {
  const count = recurring.interval_count * times
  switch (recurring.interval) {
    case "day":
      return anchor + count * DAY_S
    case "week":
      return anchor + count * 7 * DAY_S
    case "year":
      return shiftedMonths(anchor, count * 12)
    default:
      return shiftedMonths(anchor, count)
  }
}

function shiftedMonths(anchor: number, months: number): number {
  const from = new Date(anchor * 1000)
  const first = new Date(from)
  first.setUTCDate(1)
  first.setUTCMonth(first.getUTCMonth() + months)
  const lastDay = new Date(Date.UTC(first.getUTCFullYear(), first.getUTCMonth() + 1, 0)).getUTCDate()
  first.setUTCDate(Math.min(from.getUTCDate(), lastDay))
  return Math.floor(first.getTime() / 1000)
}

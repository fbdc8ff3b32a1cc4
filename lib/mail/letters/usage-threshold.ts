import type { Letter } from "../compose"

export interface UsageThresholdData {
  account_name: string
  /** Share of the units that is spent: 80 or 100. */
  percent: number
  units: number
  unit_cap: number
  /** When counting begins anew, RFC 3339. */
  period_end: string
  usage_url: string
}

export function usageThreshold(data: UsageThresholdData): Letter {
  const { account_name, percent, units, unit_cap, period_end, usage_url } = data
  const day = new Date(period_end).toLocaleDateString("en-GB", { dateStyle: "long", timeZone: "UTC" })
  const spent = `${units.toLocaleString("en-GB")} of ${unit_cap.toLocaleString("en-GB")} units`
  const consequence =
    percent >= 100
      ? `Further calls are refused with 402 until ${day}, or until an owner changes the plan or the spending cap.`
      : `Counting begins anew on ${day}.`
  return {
    subject: `${account_name} has used ${percent} % of its units`,
    paragraphs: [`${account_name} has used ${spent} of this period.`, consequence],
    action: { label: "See the usage", url: usage_url },
    reason: `You receive this as an owner of ${account_name}, once for each threshold and period.`,
  }
}

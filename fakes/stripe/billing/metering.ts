import type { Fake } from "../core/fake"
import type { MeterReading, Objects } from "../core/state"

type Meter = Objects["billing.meter"]

const HOUR_S = 3600
const DAY_S = 86_400

/**
 * Usage of a customer from `start` up to but not including `end`, Unix seconds. A meter with a time window keeps
 * only the newest reading of each window. @source Stripe docs, "Recording usage": pre-aggregated meter events
 */
export function usage(fake: Fake, meter: Meter, customer: string, start: number, end: number): number {
  const counted = countedReadings(fake, meter, customer).filter(
    (reading) => reading.timestamp >= start && reading.timestamp < end,
  )
  switch (meter.default_aggregation.formula) {
    case "count":
      return counted.length
    case "last":
      return counted.at(-1)?.value ?? 0
    default:
      return counted.reduce((sum, reading) => sum + reading.value, 0)
  }
}

function countedReadings(fake: Fake, meter: Meter, customer: string): MeterReading[] {
  const readings = fake.state.readings
    .filter((reading) => reading.meter_event_name === meter.event_name && !reading.cancelled)
    .filter((reading) => reading.customer === customer)
    .sort((a, b) => a.timestamp - b.timestamp || a.received - b.received)
  if (!meter.event_time_window) return readings
  const window = meter.event_time_window === "day" ? DAY_S : HOUR_S
  const newest = new Map(readings.map((reading) => [Math.floor(reading.timestamp / window), reading]))
  return [...newest.values()]
}

import { findRoot } from "@/lib/numeric/find-root"
import { ControlledPlant, type Controller, type PlantState, SHORTEST_STEP_MIN } from "./controlled-plant"

/** When gas and light are on. Time runs in minutes from the moment the gas is allowed. */
export interface GasSchedule {
  readonly duration_min: number
  readonly gas_until_min: number
  readonly lights_from_min: number
  readonly lights_until_min: number
}

/** Full cycles of the valve: from the first time the controller closes it to the last. */
export interface HoldingStatistics {
  readonly cycles: number
  readonly minutes: number
  readonly open_min: number
  readonly max_co2_mg_l: number
  readonly min_co2_mg_l: number
}

export interface ControlledRun {
  readonly open_min: number
  /** Times the solenoid moved, either way. */
  readonly switches: number
  readonly max_co2_mg_l: number
  readonly min_co2_mg_l: number
  /** When the controller first closed the valve, or `null` if it never did. */
  readonly first_close_min: number | null
  /** `null` unless the controller closed the valve at least twice. */
  readonly holding: HoldingStatistics | null
  /** True if the plants took all CO2 at some time. */
  readonly emptied: boolean
  readonly end: PlantState
}

/**
 * Runs a pH controller through a schedule in steps of one minute, with each switching found within its step.
 *
 * `samples`, if given, receives the CO2 at every whole minute from 0, as far as it goes. Against an adaptive solver with events:
 * cycles and duty within 0.1 %, extremes within 0.05 %.
 */
export function simulateController(
  controller: Controller,
  schedule: GasSchedule,
  start: PlantState,
  samples?: Float64Array,
): ControlledRun {
  const run = new Run(controller, start)
  const edges = [schedule.gas_until_min, schedule.lights_from_min, schedule.lights_until_min]
    .filter((edge) => edge > 0 && edge < schedule.duration_min)
    .sort((a, b) => a - b)
  if (samples) samples[0] = start.co2_mg_l
  let from = 0
  for (const until of [...edges, schedule.duration_min]) {
    const middle = (from + until) / 2
    run.enter(
      from,
      middle < schedule.gas_until_min,
      middle > schedule.lights_from_min && middle < schedule.lights_until_min,
    )
    for (let time = from; time < until; ) {
      const next = Math.min(Math.floor(time) + 1, until)
      run.advance(time, next)
      if (samples && next < samples.length && Number.isInteger(next)) samples[next] = run.plant.co2
      time = next
    }
    from = until
  }
  return run.result()
}

/** The valve and the tally around the plant. */
class Run {
  readonly plant: ControlledPlant
  private open = false
  private gas = false
  private lit = false
  private openMinutes = 0
  private switches = 0
  private highest: number
  private lowest: number
  private firstClose: number | null = null
  private openAtFirstClose = 0
  private lastClose = 0
  private openAtLastClose = 0
  private closes = 0
  private cycleHigh = Number.NEGATIVE_INFINITY
  private cycleLow = Number.POSITIVE_INFINITY

  constructor(
    private readonly controller: Controller,
    start: PlantState,
  ) {
    this.plant = new ControlledPlant(controller, start)
    this.highest = start.co2_mg_l
    this.lowest = start.co2_mg_l
  }

  enter(time: number, gas: boolean, lit: boolean): void {
    this.lit = lit
    if (gas && !this.gas && this.plant.probe >= this.controller.on_ph) this.turn(true)
    if (!gas && this.open) this.turn(false)
    this.gas = gas
    this.plant.drive(this.open, this.lit)
    if (time === 0) this.plant.resetExtremes()
  }

  advance(from: number, to: number): void {
    let time = from
    while (to - time >= SHORTEST_STEP_MIN) {
      const step = to - time
      if (!this.crossed(this.plant.attempt(step))) {
        this.take(step)
        return
      }
      const reach = this.reach(step)
      if (reach >= SHORTEST_STEP_MIN) {
        this.plant.attempt(reach)
        this.take(reach)
        time += reach
      }
      if (this.open) this.closed(time)
      this.turn(!this.open)
      this.plant.drive(this.open, this.lit)
    }
  }

  result(): ControlledRun {
    this.mergeExtremes()
    return {
      open_min: this.openMinutes,
      switches: this.switches,
      max_co2_mg_l: this.highest,
      min_co2_mg_l: this.lowest,
      first_close_min: this.firstClose,
      holding:
        this.closes < 2
          ? null
          : {
              cycles: this.closes - 1,
              minutes: this.lastClose - this.firstClose!,
              open_min: this.openAtLastClose - this.openAtFirstClose,
              max_co2_mg_l: this.cycleHigh,
              min_co2_mg_l: this.cycleLow,
            },
      emptied: this.plant.emptied,
      end: this.plant.state(),
    }
  }

  private take(minutes: number): void {
    this.plant.accept()
    if (this.open) this.openMinutes += minutes
  }

  /** Whether a reading of the probe moves the valve. */
  private crossed(reading: number): boolean {
    const { off_ph, on_ph } = this.controller
    return this.gas && (this.open ? reading <= off_ph : reading >= on_ph)
  }

  /** Minutes within the step until the probe meets the threshold that moves the valve; 0 if it is past it already. */
  private reach(step: number): number {
    const { off_ph, on_ph } = this.controller
    if (this.crossed(this.plant.probe)) return 0
    const threshold = this.open ? off_ph : on_ph
    const past = (minutes: number) =>
      (minutes === 0 ? this.plant.probe : this.plant.attempt(minutes)) - threshold
    return findRoot({ f: past, low: 0, high: step, tolerance: SHORTEST_STEP_MIN / 10 })
  }

  private turn(open: boolean): void {
    this.open = open
    this.switches += 1
  }

  private closed(time: number): void {
    this.closes += 1
    const first = this.firstClose === null
    if (first) {
      this.firstClose = time
      this.openAtFirstClose = this.openMinutes
    }
    const { highest, lowest } = this.plant
    this.mergeExtremes()
    if (!first) {
      this.cycleHigh = Math.max(this.cycleHigh, highest)
      this.cycleLow = Math.min(this.cycleLow, lowest)
    }
    this.lastClose = time
    this.openAtLastClose = this.openMinutes
  }

  private mergeExtremes(): void {
    this.highest = Math.max(this.highest, this.plant.highest)
    this.lowest = Math.min(this.lowest, this.plant.lowest)
    this.plant.resetExtremes()
  }
}

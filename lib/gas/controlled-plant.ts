import type { TankBalance } from "./balance"

export interface Controller {
  readonly tank: TankBalance
  readonly feed_mg_min: number
  /** The valve closes when the probe reads this or less. */
  readonly off_ph: number
  /** The valve opens when the probe reads this or more. */
  readonly on_ph: number
  /** Time constant of the probe and of the water's way to it. */
  readonly probe_lag_min: number
  /** Time constant of the gas held in hose and reactor: it goes on dissolving after the valve has closed. */
  readonly line_lag_min: number
  /** pH of the tank's water from its CO2, such as `phCurve`. */
  readonly ph: (co2_mg_l: number) => number
}

/** What the plant remembers between two moments. */
export interface PlantState {
  readonly co2_mg_l: number
  /** CO2 that the held gas gives to the water. */
  readonly source_mg_l_min: number
  readonly probe_ph: number
}

/** Shorter steps are none: a hundred-thousandth of a second is nothing to a tank, and differences drown in rounding. */
export const SHORTEST_STEP_MIN = 1e-7

/**
 * Tank, gas line and probe, stepped exactly: CO2 and the held gas are linear and advance in closed form by any step;
 * the probe follows the pH, taken as a parabola through the start, middle and end of the step. Times in minutes.
 *
 * A class, because a simulation steps it some 1,500 times a day and must not allocate.
 */
export class ControlledPlant {
  co2: number
  probe: number
  /** Highest and lowest CO2 since `resetExtremes`, also between the steps. */
  highest: number
  lowest: number
  /** True once the plants have taken all CO2 there was. */
  emptied = false
  private source: number
  private ph: number
  private supply = 0
  private limit = 0
  // The step attempted last.
  private nextCo2 = 0
  private nextPh = 0
  private nextProbe = 0
  private fromLine = 0
  private fromAir = 0
  private taken: StepFactors
  private readonly k: number
  private readonly holds: number
  private readonly oneMinute: StepFactors

  constructor(
    private readonly controller: Controller,
    start: PlantState,
  ) {
    const { tank } = controller
    this.k = tank.exchange_per_h / 60
    this.holds = lineLag(controller.line_lag_min, this.k)
    this.oneMinute = this.factors(1)
    this.taken = this.oneMinute
    this.co2 = start.co2_mg_l
    this.source = start.source_mg_l_min
    this.probe = start.probe_ph
    this.ph = controller.ph(start.co2_mg_l)
    this.highest = start.co2_mg_l
    this.lowest = start.co2_mg_l
  }

  /** Sets valve and light from now on. */
  drive(open: boolean, lit: boolean): void {
    const { tank, feed_mg_min } = this.controller
    this.supply = open ? (tank.dissolution_efficiency * feed_mg_min) / tank.volume_l : 0
    const net = tank.respiration_mg_l_h - (lit ? tank.plant_uptake_mg_l_h : 0)
    this.limit = tank.air_co2_mg_l + (this.supply + net / 60) / this.k
  }

  /** What the probe will read after a step of at least `SHORTEST_STEP_MIN`. It is not taken until `accept`. */
  attempt(minutes: number): number {
    const { k, holds, controller } = this
    const factors = minutes === 1 ? this.oneMinute : this.factors(minutes)
    const fromLine = ((this.source - this.supply) * holds) / (k * holds - 1)
    const fromAir = this.co2 - this.limit - fromLine
    const middle = this.limit + fromLine * factors.halfLine + fromAir * factors.halfAir
    const end = this.limit + fromLine * factors.line + fromAir * factors.air
    this.nextCo2 = end
    this.nextPh = controller.ph(end)
    this.nextProbe = this.probeThrough(controller.ph(middle), this.nextPh, minutes, factors.probe)
    this.fromLine = fromLine
    this.fromAir = fromAir
    this.taken = factors
    return this.nextProbe
  }

  /** Takes the step last attempted. */
  accept(): void {
    const { line } = this.taken
    this.trackTurn()
    this.source = this.supply + (this.source - this.supply) * line
    this.co2 = this.nextCo2
    this.ph = this.nextPh
    this.probe = this.nextProbe
    if (this.co2 < 0) this.empty()
    if (this.co2 > this.highest) this.highest = this.co2
    if (this.co2 < this.lowest) this.lowest = this.co2
  }

  state(): PlantState {
    return { co2_mg_l: this.co2, source_mg_l_min: this.source, probe_ph: this.probe }
  }

  resetExtremes(): void {
    this.highest = this.co2
    this.lowest = this.co2
  }

  /** Exact answer of the lag to the parabola through the pH at the start, middle and end of the step. */
  private probeThrough(middlePh: number, endPh: number, minutes: number, kept: number): number {
    const lag = this.controller.probe_lag_min
    const straight = minutes < STRAIGHT_BELOW_MIN
    const curvature = straight ? 0 : (2 * (endPh - 2 * middlePh + this.ph)) / (minutes * minutes)
    const slope = straight ? (endPh - this.ph) / minutes : (4 * middlePh - 3 * this.ph - endPh) / minutes
    const bend = 2 * lag * lag * curvature
    const settledStart = this.ph - lag * slope + bend
    const settledEnd = endPh - lag * (slope + 2 * curvature * minutes) + bend
    return settledEnd + (this.probe - settledStart) * kept
  }

  /** CO2 may turn within the step, when the held gas runs out; the turning point is in closed form too. */
  private trackTurn(): void {
    const { k, holds, fromLine, fromAir, taken } = this
    if (holds === 0) return
    const startSlope = -fromLine / holds - fromAir * k
    const endSlope = (-fromLine / holds) * taken.line - fromAir * k * taken.air
    if (startSlope * endSlope >= 0) return
    const at = -Math.log((-fromAir * k * holds) / fromLine) / (1 / holds - k)
    const turn = this.limit + fromLine * Math.exp(-at / holds) + fromAir * Math.exp(-k * at)
    this.highest = Math.max(this.highest, turn)
    this.lowest = Math.min(this.lowest, Math.max(turn, 0))
  }

  private empty(): void {
    this.emptied = true
    this.co2 = 0
    this.ph = this.controller.ph(0)
  }

  private factors(minutes: number): StepFactors {
    const halfAir = Math.exp((-this.k * minutes) / 2)
    const halfLine = Math.exp(-minutes / (2 * this.holds))
    const probe = Math.exp(-minutes / this.controller.probe_lag_min)
    return { halfAir, air: halfAir * halfAir, halfLine, line: halfLine * halfLine, probe }
  }
}

/** Steps so short that the parabola would be rounding only; a straight line is as good. */
const STRAIGHT_BELOW_MIN = 1e-3

/** The lag for the closed form, which is 0/0 for a lag of 1/k, and for the shortest ones of all. */
function lineLag(minutes: number, k: number): number {
  if (minutes < 1e-6) return 0
  return Math.abs(k * minutes - 1) < 1e-6 ? minutes * (1 + 1e-6) : minutes
}

/** What is left of a deviation from the air, the held gas and the probe after a step, and after half of it. */
interface StepFactors {
  readonly halfAir: number
  readonly air: number
  readonly halfLine: number
  readonly line: number
  readonly probe: number
}

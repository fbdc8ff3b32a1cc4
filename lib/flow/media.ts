import type { PumpCurve } from "./pump-curve"

/** Loss of the filter media at their cleanest: h = linear Q + quadratic Q², in m with Q in m³/s. */
export interface MediaLoss {
  readonly linear_s_m2: number
  readonly quadratic_s2_m5: number
}

/** Share of the media's loss that is viscous at full flow. @source engineeringJudgement, after Ergun's two terms */
const VISCOUS_SHARE = 0.5

/** Share of the advertised flow that the filter passes with clean media and no hose. @source engineeringJudgement */
export const CLEAN_MEDIA_FRACTION = { low: 0.65, typical: 0.8, high: 0.9 }

/**
 * The clean media's loss, from the share of its greatest flow that the filter passes with media and without hose.
 * A share of 1 is a filter whose maker measured it with its media in.
 */
export function cleanMediaLoss(pump: PumpCurve, cleanFraction: number): MediaLoss {
  const q = cleanFraction
  const scale = pump.headAt(q * pump.maxFlow_m3_s) / (VISCOUS_SHARE * q + (1 - VISCOUS_SHARE) * q * q)
  return {
    linear_s_m2: (scale * VISCOUS_SHARE) / pump.maxFlow_m3_s,
    quadratic_s2_m5: (scale * (1 - VISCOUS_SHARE)) / pump.maxFlow_m3_s ** 2,
  }
}

/**
 * How many times the clean loss the media cost: clogging 0 (clean) → 1, 0.3 → 2 (loaded), 0.7 → 5 (due for
 * cleaning), 1 (blocked) → 10. Equal steps of clogging multiply the loss equally, as deposits do.
 *
 * @source engineeringJudgement: the factors 1, 2, 5, 10 and the scale between them are a convention of this engine.
 */
export function clogFactor(clogging: number): number {
  return 10 ** clogging
}

/** The clogging at which the media cost `factor` times their clean loss: the inverse of {@link clogFactor}. */
export function cloggingOf(factor: number): number {
  return Math.log10(factor)
}

/** The clogging at which a filter is due for cleaning: five times the clean loss, 0.699. */
export const DUE_CLOGGING = cloggingOf(5)

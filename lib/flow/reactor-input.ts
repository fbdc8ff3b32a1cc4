import { carbonateSystem, co2AtPressure } from "@/lib/chemistry/carbonate"
import { waterVapourPressureAtm } from "@/lib/chemistry/water"
import type { DissolvingInto } from "@/lib/gas/bubble-dissolution"
import { bubbleWater } from "@/lib/gas/bubble-rise"
import { checkBounds } from "@/lib/units/bounds"
import { figures } from "@/lib/units/figures"
import { OutOfDomain } from "@/lib/units/out-of-domain"
import { quantities } from "@/lib/units/quantities"
import { type BubbleTravel, bubbleTravel } from "./bubble-travel"
import { type ElementInput, type ElementKind, elementTable } from "./elements"
import { flowDefaults, type LoopInput, type PreparedLoop, prepareLoop } from "./loop-input"

/** A reactor as on the wire; what is left out follows from `reactorDefaults`. */
export interface ReactorInput {
  readonly body_diameter_mm: number
  /** Free length in which bubbles may travel. */
  readonly body_length_mm: number
  /** Loss coefficient of the whole reactor, referred to the hose. */
  readonly k?: number
  readonly nozzle_diameter_mm?: number
  readonly water_pressure_bar_abs?: number
  readonly bypass_fraction?: number
  readonly feed_bubble_diameter_mm?: number
}

/** A filter's loop with a reactor in it, as on the wire with its defaults filled in. */
export interface ReactorLoopInput extends LoopInput {
  readonly reactor: ReactorInput
  readonly feed_mg_min: number
  readonly inlet_co2_mg_l: number
}

/** What a reactor takes for granted when the caller does not say: the only place. */
export const reactorDefaults = {
  ...flowDefaults,
  /** The usual target of a planted tank: the water that comes in when the tank is there. Common practice, no source. */
  inlet_co2_mg_l: 30,
  /** Air and 0.7 to 1 m of water and the loop's loss behind it. @source engineeringJudgement */
  water_pressure_bar_abs: 1.12,
  /** Bore of the inlet over that of the hose. @source engineeringJudgement */
  nozzle_ratio: 0.8,
  /** Largest bubble that the inlet jet leaves whole. @source engineeringJudgement */
  feed_bubble_diameter_mm: 3,
  bypass_fraction: 0,
} as const

/** A reactor with every dimension known, and the water in it. */
export interface PreparedReactor {
  readonly loop: PreparedLoop
  /** The same loop with the reactor taken out. */
  readonly loopWithout: PreparedLoop
  readonly body_mm: number
  readonly length_m: number
  readonly nozzle_mm: number
  readonly feed_bubble_mm: number
  /** Share of the loop's flow that passes through the reactor. */
  readonly through: number
  readonly feed_mg_min: number
  readonly into: DissolvingInto
  readonly bubbles: BubbleTravel
  readonly volume_l: number | undefined
}

/** Compiles a loop with its reactor. Throws {@link OutOfDomain} on the field to change. */
export function prepareReactor(input: ReactorLoopInput): PreparedReactor {
  const { reactor, feed_mg_min, inlet_co2_mg_l } = input
  checkBounds({ feed_mg_min, inlet_co2_mg_l }, quantities)
  checkBounds(reactor, quantities, "reactor.")
  if (input.temperature_c < COLDEST_C || input.temperature_c > HOTTEST_C) {
    throw new OutOfDomain(
      "temperature_c",
      `The rise of bubbles is known from ${COLDEST_C} to ${HOTTEST_C} °C; you gave ${figures(input.temperature_c, 3)}.`,
    )
  }
  const hose_mm = (input.return_hose ?? input.hose).inner_diameter_mm
  const into = reactorWater(
    input.temperature_c,
    reactor.water_pressure_bar_abs ?? reactorDefaults.water_pressure_bar_abs,
    inlet_co2_mg_l,
  )
  const feed_bubble_mm = reactor.feed_bubble_diameter_mm ?? reactorDefaults.feed_bubble_diameter_mm
  return {
    loop: prepareLoop({ ...input, elements: withReactor(input.elements, reactor) }),
    loopWithout: prepareLoop({ ...input, elements: withoutReactor(input.elements) }),
    body_mm: reactor.body_diameter_mm,
    length_m: reactor.body_length_mm / 1000,
    nozzle_mm: reactor.nozzle_diameter_mm ?? reactorDefaults.nozzle_ratio * hose_mm,
    feed_bubble_mm,
    through: throughReactor(reactor),
    feed_mg_min,
    into,
    bubbles: bubbleTravel(feed_bubble_mm, into),
    volume_l: input.volume_l,
  }
}

/** Ends of the range of the bubbles' rise. @source cliftGraceWeber1978 */
const COLDEST_C = 5
const HOTTEST_C = 40

/** The water in a reactor, as its bubbles feel it. */
export function reactorWater(
  temperature_c: number,
  water_pressure_bar_abs: number,
  co2_mg_l: number,
): DissolvingInto {
  return {
    water: bubbleWater(temperature_c),
    pressure_pa: water_pressure_bar_abs * 1e5,
    co2_mg_l,
    henry_mg_l_atm: co2AtPressure(carbonateSystem({ temperature_c, ionic_strength_mol_l: 0 }), 1),
    vapour_pressure_atm: waterVapourPressureAtm(temperature_c),
  }
}

/**
 * A loop's elements with the reactor among them. A reactor that the list names already stands for it; with a bypass
 * only a share of the flow meets its loss, which falls with the square of that share.
 */
export function withReactor(elements: readonly ElementInput[], reactor: ReactorInput): ElementInput[] {
  const through = throughReactor(reactor)
  const named = elements.some(({ kind }) => isReactor(kind))
  const list: readonly ElementInput[] = named ? elements : [...elements, { kind: "reactor", in_return: true }]
  return list.map((element) => {
    if (!isReactor(element.kind)) return element
    const k = reactor.k ?? element.k
    if (k === undefined && through === 1) return element
    return { ...element, k: (k ?? elementTable[element.kind].k) * through ** 2 }
  })
}

export function withoutReactor(elements: readonly ElementInput[]): ElementInput[] {
  return elements.filter(({ kind }) => !isReactor(kind))
}

function throughReactor({ bypass_fraction }: ReactorInput): number {
  return 1 - (bypass_fraction ?? reactorDefaults.bypass_fraction)
}

function isReactor(kind: ElementKind): boolean {
  return kind.startsWith("reactor")
}

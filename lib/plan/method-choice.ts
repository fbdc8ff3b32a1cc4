import type { ReactorAnswer } from "@/lib/flow/reactor-verdict"
import { type GasMethodName, gasMethods } from "@/lib/gas/methods"
import { figures } from "@/lib/units/figures"
import type { FlowNeed } from "./minimum-filter"

export const methodNames = ["inline_reactor", "inline_diffuser", "diffuser"] as const

export type Fit = "recommended" | "possible" | "unsuitable"

/** One way to get the gas into the water, with what speaks for it and against it here. */
export interface MethodOption {
  readonly name: GasMethodName
  readonly label: string
  readonly fit: Fit
  readonly for: readonly string[]
  readonly against: readonly string[]
}

export interface MethodChoice {
  /** What the plan is made for: what is owned or wished, else what is recommended. */
  readonly name: GasMethodName
  readonly label: string
  readonly recommended: GasMethodName
  /** Why, in a sentence or two with numbers. */
  readonly reasons: readonly string[]
  readonly options: readonly MethodOption[]
}

/** What decides between the methods. */
export interface MethodFacts {
  readonly volume_l: number
  /** Of the loop with nothing added for the gas. */
  readonly flow_l_h: number
  readonly reactor: ReactorAnswer
}

/** L/h and L from which an inline diffuser makes sense. Common practice, no source. */
const INLINE_DIFFUSER = { flow_l_h: 150, volume_l: 40 }

/** Times an hour that the water should pass the filter to spread CO2. Common practice, no source. */
const TURNOVER_PER_H = 2.5

/**
 * The method that suits a tank: a reactor where it works and still works when the filter is due for cleaning, an
 * inline diffuser where the filter is too weak for one, a diffuser in the tank where it is weak altogether.
 */
export function recommendedMethod({ volume_l, flow_l_h, reactor }: MethodFacts): GasMethodName {
  if (reactor.verdict !== "unsuitable" && reactor.when_due.verdict !== "unsuitable") return "inline_reactor"
  const carriesDiffuser = flow_l_h >= INLINE_DIFFUSER.flow_l_h && volume_l >= INLINE_DIFFUSER.volume_l
  return carriesDiffuser ? "inline_diffuser" : "diffuser"
}

/** The flow that a method asks of the filter. */
export function flowNeed(name: GasMethodName, { volume_l, reactor }: MethodFacts): FlowNeed {
  const spread = TURNOVER_PER_H * volume_l
  if (name === "inline_reactor") {
    return { clean_flow_l_h: Math.max(LEAST_REACTOR_L_H, spread), due_flow_l_h: reactor.minimum_flow_l_h }
  }
  const least = name === "inline_diffuser" ? INLINE_DIFFUSER.flow_l_h : 0
  return { clean_flow_l_h: Math.max(least, spread), due_flow_l_h: 0 }
}

/** L/h below which no reactor works. Common practice, no source. */
const LEAST_REACTOR_L_H = 250

/** The choice with the case for and against each method; `use_g_day` is the plan's use by the chosen one. */
export function methodChoice(
  name: GasMethodName,
  facts: MethodFacts & { readonly use_g_day: number; readonly efficiency: number },
): MethodChoice {
  const recommended = recommendedMethod(facts)
  const options = methodNames.map((method) => option(method, recommended, facts, facts))
  const verdict =
    name === recommended
      ? `For this tank we recommend ${gasMethods[name].label}.`
      : `You have or want ${gasMethods[name].label}; for this tank we would take ${gasMethods[recommended].label}.`
  const chosen = options.find((each) => each.name === name)!
  const reasons = [
    verdict,
    ...chosen.for,
    ...(recommended === "inline_reactor" ? [] : whyNoReactor(facts.reactor)),
  ]
  return { name, label: plainLabel(name), recommended, reasons, options }
}

function option(
  name: GasMethodName,
  recommended: GasMethodName,
  facts: MethodFacts,
  use: { readonly use_g_day: number; readonly efficiency: number },
): MethodOption {
  const { efficiency, element_bar } = gasMethods[name]
  const grams = figures((use.use_g_day * use.efficiency) / efficiency.usual, 2)
  const share = efficiency.usual === 1 ? "Practically all" : `About ${figures(100 * efficiency.usual, 2)} %`
  const gas = `${share} of the gas dissolves: some ${grams} g a day are used.`
  const pressure = `It needs ${figures(element_bar.low + REST_BAR.low, 2)} to ${figures(element_bar.high + REST_BAR.high, 2)} bar at the reducer.`
  const fit = name === recommended ? "recommended" : possible(name, facts) ? "possible" : "unsuitable"
  return { name, label: plainLabel(name), fit, ...CASES[name](facts, gas, pressure) }
}

/** bar that water, check valve and needle valve add to what the element asks for. @source engineeringJudgement */
const REST_BAR = { low: 0.6, high: 0.9 }

/** "inline reactor" */
function plainLabel(name: GasMethodName): string {
  return name.replace("_", " ")
}

function possible(name: GasMethodName, { flow_l_h, reactor }: MethodFacts): boolean {
  if (name === "inline_reactor") return reactor.verdict !== "unsuitable"
  return name === "diffuser" || flow_l_h >= INLINE_DIFFUSER.flow_l_h
}

type Case = Pick<MethodOption, "for" | "against">

const CASES: Readonly<Record<GasMethodName, (facts: MethodFacts, gas: string, pressure: string) => Case>> = {
  inline_reactor: ({ reactor }, gas, pressure) => ({
    for: [
      gas,
      "No mist of bubbles in the tank, and nothing to see in it.",
      pressure,
      ...reactor.reasons.filter(({ verdict }) => verdict === "suitable").map(({ message }) => message),
    ],
    against: [
      ...whyNoReactor(reactor),
      `When the filter is due for cleaning the flow is ${figures(reactor.when_due.flow_l_h, 3)} L/h, which makes the reactor ${reactor.when_due.verdict}; it grows noisy below ${figures(reactor.minimum_flow_l_h, 3)} L/h.`,
    ],
  }),
  inline_diffuser: ({ flow_l_h }, gas, pressure) => ({
    for: [
      gas,
      "It sits in the return line, out of sight, and takes little flow.",
      ...(flow_l_h >= INLINE_DIFFUSER.flow_l_h
        ? [`The filter moves ${figures(flow_l_h, 3)} L/h, enough to carry its mist to the tank.`]
        : []),
    ],
    against: [
      ...(flow_l_h < INLINE_DIFFUSER.flow_l_h
        ? [`The filter moves only ${figures(flow_l_h, 3)} L/h; it wants ${INLINE_DIFFUSER.flow_l_h}.`]
        : []),
      "A mist of fine bubbles comes out of the return.",
      `${pressure} Its ceramic has to be soaked clean every few weeks.`,
    ],
  }),
  diffuser: ({ flow_l_h, volume_l }, gas, pressure) => ({
    for: [
      "It works with any filter and is seen to work.",
      "The simplest to fit, with no joint in the water loop.",
    ],
    against: [
      gas,
      `It stands in sight in the tank. ${pressure} Its ceramic has to be cleaned.`,
      ...(volume_l > 200
        ? [`One diffuser hardly serves ${figures(volume_l, 3)} L: its bubbles rise in one corner.`]
        : []),
      ...(flow_l_h / volume_l < TURNOVER_PER_H
        ? [
            `The water turns over ${figures(flow_l_h / volume_l, 2)} times an hour, too little to spread its CO2.`,
          ]
        : []),
    ],
  }),
}

function whyNoReactor(reactor: ReactorAnswer): string[] {
  return reactor.reasons.filter(({ verdict }) => verdict !== "suitable").map(({ message }) => message)
}

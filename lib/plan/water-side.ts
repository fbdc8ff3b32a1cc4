import type { Answer } from "@/lib/chemistry/answer"
import type { ElementInput } from "@/lib/flow/elements"
import { flowAt, type LoopInput, prepareLoop } from "@/lib/flow/loop-input"
import { type FlowUncertainty, type OperatingPoint, operatingPoint } from "@/lib/flow/operating-point"
import { type ReactorInput, withoutReactor, withReactor } from "@/lib/flow/reactor-input"
import { type ReactorAnswer, type ReactorUncertainty, reactorVerdict } from "@/lib/flow/reactor-verdict"
import type { GasMethodName } from "@/lib/gas/methods"
import { withFields } from "@/lib/units/out-of-domain"
import { flowNeed, type MethodFacts, recommendedMethod } from "./method-choice"
import { type MinimumFilter, minimumFilter } from "./minimum-filter"
import type { PlanInput } from "./plan-input"
import { sizeReactor } from "./reactor-size"

/** The loop with the method that suits it, and the reactor that would stand in it. */
export interface WaterSide {
  readonly name: GasMethodName
  readonly choice: MethodFacts
  /** The loop as planned, and with nothing for the gas in it. */
  readonly loop: LoopInput
  readonly bare: LoopInput
  readonly flow: Answer<OperatingPoint, FlowUncertainty>
  readonly reactor: Answer<ReactorAnswer, ReactorUncertainty>
  readonly reactor_size: ReactorInput
  readonly minimum_filter: MinimumFilter
  readonly minimum_reactor_filter: MinimumFilter
}

/** Solves the loop, judges a reactor in it at a feed, and picks the method. */
export function waterSide(input: PlanInput, volume_l: number, feed_mg_min: number): WaterSide {
  const { equipment } = input
  // Errors name an element by its place in the list that was given, so that list is checked before it is changed.
  prepareLoop({ ...input, volume_l })
  const bare: LoopInput = { ...input, volume_l, elements: withoutGasDevice(input.elements) }
  const loop = prepareLoop(bare)
  const flow_l_h = flowAt(loop, input.clogging)
  const reactor_size = equipment?.reactor ?? sizeReactor({ flow_l_h, feed_mg_min })
  const named = input.elements.filter(({ kind }) => kind !== "inline_diffuser")
  const reactor = withFields(fieldsOf(equipment?.reactor), () =>
    reactorVerdict({
      ...bare,
      elements: named,
      reactor: reactor_size,
      feed_mg_min,
      inlet_co2_mg_l: input.target_co2_mg_l,
    }),
  )
  const choice = { volume_l, flow_l_h, reactor: reactor.result }
  const name = equipment?.method ?? recommendedMethod(choice)
  const reactorLoop = prepareLoop({ ...bare, elements: withReactor(named, reactor_size) })
  const chosen = { ...bare, elements: withGasDevice(name, named, reactor_size) }
  const minimum_reactor_filter = minimumFilter(reactorLoop, flowNeed("inline_reactor", choice))
  return {
    name,
    choice,
    loop: chosen,
    bare,
    flow: operatingPoint(chosen),
    reactor,
    reactor_size,
    minimum_filter:
      name === "inline_reactor"
        ? minimum_reactor_filter
        : minimumFilter(prepareLoop(chosen), flowNeed(name, choice)),
    minimum_reactor_filter,
  }
}

/** Where the person gave what the reactor's verdict calls by its own name. */
function fieldsOf(reactor: ReactorInput | undefined): Record<string, string> {
  const names = Object.keys(reactor ?? {}).map((name) => [`reactor.${name}`, `equipment.reactor.${name}`])
  return Object.fromEntries(names)
}

function withGasDevice(
  name: GasMethodName,
  named: readonly ElementInput[],
  reactor: ReactorInput,
): readonly ElementInput[] {
  if (name === "inline_reactor") return withReactor(named, reactor)
  const bare = withoutReactor(named)
  return name === "inline_diffuser" ? [...bare, { kind: "inline_diffuser", in_return: true }] : bare
}

function withoutGasDevice(elements: readonly ElementInput[]): ElementInput[] {
  return withoutReactor(elements).filter(({ kind }) => kind !== "inline_diffuser")
}

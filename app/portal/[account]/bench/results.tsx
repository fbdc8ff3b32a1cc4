"use client"

import { memo } from "react"
import { Cautions } from "@/app/ui/cautions"
import { SchematicDrawing } from "@/app/ui/schematic/drawing"
import type { Reading } from "@/lib/units/format"
import { Answer } from "./answer"
import { CylinderPart, RoomPart } from "./cylinder-part"
import { DayPart } from "./day-part"
import { FlowPart } from "./flow-part"
import { GasPart } from "./gas-part"
import { LevelPart } from "./level-part"
import { MatchesPart } from "./matches-part"
import { MethodPart } from "./method-part"
import { Part, planCodes } from "./part"
import type { Worked } from "./work-out"
import { AssemblyPart, BasisPart, CarePart, PartsPart, TroublePart } from "./work-parts"

interface ResultsProps {
  readonly account: string
  readonly worked: Worked
  readonly reading: Reading
  readonly mayStock: boolean
}

/** Everything that the engine says of the tank, each result with what must be known beside it. */
export const Results = memo(function Results({ account, worked, reading, mayStock }: ResultsProps) {
  const shared = { worked, reading }
  return (
    <div className="flex flex-col">
      <Answer {...shared} />
      <Part title="The system" className="order-1 @min-[60rem]:order-none">
        <SchematicDrawing schematic={worked.plan.result.schematic} reading={reading} />
      </Part>
      <LevelPart {...shared} />
      <MethodPart {...shared} />
      <GasPart {...shared} />
      <DayPart {...shared} />
      <FlowPart {...shared} />
      <CylinderPart {...shared} />
      <RoomPart {...shared} />
      <MatchesPart account={account} worked={worked} mayStock={mayStock} />
      <div className="order-2">
        <PartsPart {...shared} />
        <AssemblyPart {...shared} />
        <CarePart {...shared} />
        <TroublePart {...shared} />
        <Others worked={worked} />
        <BasisPart {...shared} />
      </div>
    </div>
  )
})

/** What the engine warns of that belongs beside no single part. */
function Others({ worked }: { worked: Worked }) {
  const { cautions, result } = worked.plan
  const placed = new Set<string>([
    ...Object.values(result.caution_sections).flat(),
    ...Object.values(planCodes).flat(),
  ])
  const others = cautions.filter(({ code }) => !placed.has(code))
  if (others.length === 0) return null
  return (
    <Part title="Also to know">
      <Cautions cautions={others} />
    </Part>
  )
}

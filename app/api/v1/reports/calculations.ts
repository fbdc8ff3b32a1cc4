import type { AnyOperation } from "@/lib/api/define-operation"
import type { ReportKind } from "@/lib/reports"
import { carbonateCo2 } from "../carbonate/co2/operation"
import { carbonatePh } from "../carbonate/ph/operation"
import { flowOperatingPoint } from "../flow/operating-point/operation"
import { flowReactor } from "../flow/reactor/operation"
import { gasCylinder } from "../gas/cylinder/operation"
import { gasLeadTime } from "../gas/lead-time/operation"
import { gasRoomSafety } from "../gas/room-safety/operation"
import { plan } from "../plan/operation"

/** The calculation behind each kind of report: the one that answers the question alone. */
export const calculations: Readonly<Record<ReportKind, AnyOperation>> = {
  plan,
  carbonate_co2: carbonateCo2,
  carbonate_ph: carbonatePh,
  gas_lead_time: gasLeadTime,
  gas_cylinder: gasCylinder,
  gas_room_safety: gasRoomSafety,
  flow_operating_point: flowOperatingPoint,
  flow_reactor: flowReactor,
}

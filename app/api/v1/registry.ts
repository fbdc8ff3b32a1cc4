import type { AnyOperation } from "@/lib/api/define-operation"
import { account } from "./account/operation"
import { batch } from "./batch/operation"
import { carbonateCo2 } from "./carbonate/co2/operation"
import { carbonateDropChecker } from "./carbonate/drop-checker/operation"
import { carbonateGrid } from "./carbonate/grid/operation"
import { carbonateKh } from "./carbonate/kh/operation"
import { carbonatePh } from "./carbonate/ph/operation"
import { carbonatePhDrop } from "./carbonate/ph-drop/operation"
import { health } from "./health/operation"
import { openapi } from "./openapi.json/operation"
import { usage } from "./usage/operation"
import { openWidgetSession } from "./widgets/[widget_id]/sessions/operation"
import { readWidgetSettings } from "./widgets/[widget_id]/settings/operation"

/** Every operation of the API, a line each. The document, the tests and both mounts read it. */
export const registry: readonly AnyOperation[] = [
  carbonateCo2,
  carbonatePh,
  carbonateKh,
  carbonatePhDrop,
  carbonateDropChecker,
  carbonateGrid,
  batch,
  usage,
  account,
  openWidgetSession,
  readWidgetSettings,
  health,
  openapi,
]

import type { AnyOperation } from "@/lib/api/define-operation"
import { account } from "./account/operation"
import { batch } from "./batch/operation"
import { carbonateCo2 } from "./carbonate/co2/operation"
import { carbonateDropChecker } from "./carbonate/drop-checker/operation"
import { carbonateGrid } from "./carbonate/grid/operation"
import { carbonateKh } from "./carbonate/kh/operation"
import { carbonatePh } from "./carbonate/ph/operation"
import { carbonatePhDrop } from "./carbonate/ph-drop/operation"
import { importCatalog } from "./catalog/imports/operation"
import { changeCatalogItem, deleteCatalogItem, readCatalogItem } from "./catalog/items/[item_id]/operation"
import { createCatalogItem, listCatalogItems } from "./catalog/items/operation"
import { matchCatalogItems } from "./catalog/match/operation"
import { eraseShopperEnquiry, readShopperEnquiry } from "./enquiries/[enquiry_id]/operation"
import { listShopperEnquiries } from "./enquiries/operation"
import { flowClogging } from "./flow/clogging/operation"
import { flowOperatingPoint } from "./flow/operating-point/operation"
import { flowReactor } from "./flow/reactor/operation"
import { gasBubbleRate } from "./gas/bubble-rate/operation"
import { gasController } from "./gas/controller/operation"
import { gasCylinder } from "./gas/cylinder/operation"
import { gasDemand } from "./gas/demand/operation"
import { gasLeadTime } from "./gas/lead-time/operation"
import { gasRoomSafety } from "./gas/room-safety/operation"
import { gasWorkingPressure } from "./gas/working-pressure/operation"
import { health } from "./health/operation"
import { tankInsightsOperation } from "./insights/tanks/operation"
import { openapi } from "./openapi.json/operation"
import { plan } from "./plan/operation"
import { deleteReportOperation, readReport } from "./reports/[report_id]/operation"
import { readReportPdf } from "./reports/[report_id]/pdf/operation"
import { shareReportOperation, unshareReportOperation } from "./reports/[report_id]/share/operation"
import { createReportOperation, listReportsOperation } from "./reports/operation"
import { usage } from "./usage/operation"
import { readWebhookDelivery } from "./webhooks/[endpoint_id]/deliveries/[delivery_id]/operation"
import { replayWebhookDelivery } from "./webhooks/[endpoint_id]/deliveries/[delivery_id]/replay/operation"
import { listWebhookDeliveries } from "./webhooks/[endpoint_id]/deliveries/operation"
import { changeWebhook, deleteWebhook, readWebhook } from "./webhooks/[endpoint_id]/operation"
import { readWebhookSecret } from "./webhooks/[endpoint_id]/secret/operation"
import { rotateWebhookSecret } from "./webhooks/[endpoint_id]/secret/rotate/operation"
import { testWebhook } from "./webhooks/[endpoint_id]/test/operation"
import { createWebhook, listWebhooks } from "./webhooks/operation"
import { readWidgetConsent } from "./widgets/[widget_id]/consent/operation"
import { sendWidgetEnquiry } from "./widgets/[widget_id]/enquiries/operation"
import { recordWidgetEvent } from "./widgets/[widget_id]/events/operation"
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
  gasDemand,
  gasLeadTime,
  gasController,
  gasCylinder,
  gasBubbleRate,
  gasWorkingPressure,
  gasRoomSafety,
  flowOperatingPoint,
  flowReactor,
  flowClogging,
  plan,
  batch,
  listReportsOperation,
  createReportOperation,
  readReport,
  deleteReportOperation,
  readReportPdf,
  shareReportOperation,
  unshareReportOperation,
  listCatalogItems,
  createCatalogItem,
  readCatalogItem,
  changeCatalogItem,
  deleteCatalogItem,
  importCatalog,
  matchCatalogItems,
  usage,
  account,
  listWebhooks,
  createWebhook,
  readWebhook,
  changeWebhook,
  deleteWebhook,
  readWebhookSecret,
  rotateWebhookSecret,
  testWebhook,
  listWebhookDeliveries,
  readWebhookDelivery,
  replayWebhookDelivery,
  openWidgetSession,
  readWidgetSettings,
  readWidgetConsent,
  sendWidgetEnquiry,
  recordWidgetEvent,
  listShopperEnquiries,
  readShopperEnquiry,
  eraseShopperEnquiry,
  tankInsightsOperation,
  health,
  openapi,
]

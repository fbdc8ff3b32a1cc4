export { buildExport } from "./build"
export {
  type AccountExport,
  BUILD_EXPORT,
  EXPORT_DAYS,
  listExports,
  readExport,
  requestExport,
} from "./request"

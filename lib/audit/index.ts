export { type AuditEntry, listActs } from "./list"
export { type Act, type Action, actionNames, recordAct } from "./record"

export { closeAccount, deletionOf, GRACE_DAYS, readClosing, reopenAccount } from "./close"
export { deleteClosedAccounts } from "./delete-closed"

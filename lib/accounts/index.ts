export { authorize, can, type Reach, type Right, reachOf } from "./can"
export { changePassword, renamePerson } from "./change-person"
export { type AccountDescription, describeAccount } from "./describe"
export { accountIdOfKey, accountIdOfSlug } from "./find-for-operator"
export { type AccountForAdmin, listAccountsForAdmin } from "./list-for-admin"
export { findMembership, listMemberships, type Membership } from "./memberships"
export { endOtherSessions, endOwnSession, listOwnSessions, type OwnSession } from "./own-sessions"
export { ownersOf } from "./owners"
export { hashPassword } from "./password"
export { PASSWORD_MAX, PASSWORD_MIN, passwordProblem } from "./password-policy"
export { normaliseEmail, type Person, type Visit, type Visitor } from "./person"
export { renameAccount } from "./rename"
export { addressToReset, requestPasswordReset, resetPassword } from "./reset-password"
export {
  beginSecondFactor,
  confirmSecondFactor,
  describeSecondFactor,
  removeSecondFactor,
  renewRecoveryCodes,
  type SecondFactorState,
} from "./second-factor"
export {
  endSession,
  type OpenedSession,
  openSession,
  type ReadSession,
  readSession,
  SESSION_DAYS,
} from "./session"
export { signIn } from "./sign-in"
export { addressToSignIn, requestSignInLink, signInByLink } from "./sign-in-link"
export { type NewPerson, signUp } from "./sign-up"
export { requireFresh, stepUp } from "./step-up"
export { addressToVerify, verifyEmail } from "./verify-email"

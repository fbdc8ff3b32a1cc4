export { acceptInvitation, type OpenInvitation, readInvitation, signUpByInvitation } from "./accept"
export { changeRole, leaveAccount, removeMember } from "./change"
export { invite, resendInvitation, revokeInvitation } from "./invite"
export { type Invitation, listInvitations, listTeam, type Member } from "./list"

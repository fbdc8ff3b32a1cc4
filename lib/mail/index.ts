export { deliverMail } from "./deliver"
export { enqueueMail, SEND_MAIL } from "./enqueue"
export type { LetterName, Mail } from "./letters"
export { renderMail } from "./render"

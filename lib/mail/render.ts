import { compose, type Letter, type Message } from "./compose"
import { letters, type Mail } from "./letters"

/** The words of a mail, as plain text and as HTML. */
export function renderMail(mail: Mail): Message {
  // The type of a mail ties its data to its template; the compiler cannot follow that through the table.
  const write = letters[mail.template] as (data: Mail["data"]) => Letter
  return compose(write(mail.data))
}

import type { AskMessages } from "./ask-messages"

export const messages: AskMessages = {
  title: (shop) => `Ask ${shop}`,
  lead: "The figures above go with your question. The answer comes by e-mail.",
  name: "Your name",
  optional: "optional",
  email: "Your e-mail address",
  message: "Your question",
  privacy: (shop) => `How ${shop} treats personal data`,
  newTab: "opens in a new tab",
  send: "Send the question",
  sending: "Sending …",
  sent: (shop, email) => `${shop} has your question. A copy is on its way to ${email}.`,
  failed: "Your question could not be sent. Everything you wrote is still here: try again in a few minutes.",
  problems: {
    name: "Use at most 100 characters, on one line.",
    email_empty: "Write the address to which the answer should go.",
    email: "Write an address such as name@example.org.",
    message_empty: "Write what you would like to know.",
    message: "Use at most 4,000 characters.",
    consent: "Tick this box, or the shop may not keep your question and cannot answer it.",
    new_words: "These words have changed meanwhile. Read them again and tick the box.",
  },
}

import type { AskMessages } from "./ask-messages"

export const messages: AskMessages = {
  title: (shop) => `${shop} fragen`,
  lead: "Die Werte oben gehen mit Ihrer Frage mit. Die Antwort kommt per E-Mail.",
  name: "Ihr Name",
  optional: "freiwillig",
  email: "Ihre E-Mail-Adresse",
  message: "Ihre Frage",
  privacy: (shop) => `Wie ${shop} mit persönlichen Daten umgeht`,
  newTab: "öffnet einen neuen Tab",
  send: "Frage absenden",
  sending: "Wird gesendet …",
  sent: (shop, email) => `${shop} hat Ihre Frage. Eine Kopie ist unterwegs an ${email}.`,
  failed:
    "Ihre Frage ließ sich nicht senden. Alles, was Sie geschrieben haben, steht noch hier: Versuchen Sie es in ein paar Minuten noch einmal.",
  problems: {
    name: "Höchstens 100 Zeichen in einer Zeile verwenden.",
    email_empty: "Bitte die Adresse angeben, an die die Antwort gehen soll.",
    email: "Bitte eine Adresse wie name@example.org angeben.",
    message_empty: "Bitte schreiben Sie, was Sie wissen möchten.",
    message: "Höchstens 4.000 Zeichen verwenden.",
    consent: "Bitte ankreuzen, sonst darf der Laden Ihre Frage nicht speichern und kann nicht antworten.",
    new_words: "Dieser Text hat sich inzwischen geändert. Bitte noch einmal lesen und ankreuzen.",
  },
}

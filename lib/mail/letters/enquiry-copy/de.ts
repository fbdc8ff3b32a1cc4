import type { EnquiryCopyMessages } from "./enquiry-copy-messages"

export const de: EnquiryCopyMessages = {
  subject: (shop) => `Ihre Frage an ${shop}`,
  greeting: (name) => (name ? `Guten Tag ${name},` : "Guten Tag,"),
  received: (shop) => `${shop} hat Ihre Frage und antwortet Ihnen an diese Adresse. Dies ist Ihre Kopie.`,
  message: (text) => `Sie schrieben:\n${text}`,
  tank: "Die Werte, die dabei waren:",
  figures: {
    volume_l: (value) => `Volumen: ${value} L`,
    ph: (value) => `pH: ${value}`,
    kh_dkh: (value) => `Karbonathärte: ${value} dKH`,
    temperature_c: (value) => `Temperatur: ${value} °C`,
  },
  withdraw: (shop) =>
    `Sie haben zugestimmt, dass ${shop} dies speichert, um Ihnen zu antworten. Das können Sie jederzeit widerrufen; der Laden hat dann nichts mehr davon.`,
  withdrawLabel: "Widerrufen und löschen",
  reason: (shop) =>
    `Sie erhalten dies einmal, weil jemand diese Adresse in einer Frage an ${shop} angegeben hat. Waren Sie das nicht, nutzen Sie den Link: Er löscht die Frage.`,
}

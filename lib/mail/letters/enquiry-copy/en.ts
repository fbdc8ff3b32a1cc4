import type { EnquiryCopyMessages } from "./enquiry-copy-messages"

export const en: EnquiryCopyMessages = {
  subject: (shop) => `Your question to ${shop}`,
  greeting: (name) => (name ? `Hello ${name},` : "Hello,"),
  received: (shop) => `${shop} has your question and will answer you at this address. This is your copy.`,
  message: (text) => `You wrote:\n${text}`,
  tank: "The figures that went with it:",
  figures: {
    volume_l: (value) => `Volume: ${value} L`,
    ph: (value) => `pH: ${value}`,
    kh_dkh: (value) => `Carbonate hardness: ${value} dKH`,
    temperature_c: (value) => `Temperature: ${value} °C`,
  },
  withdraw: (shop) =>
    `You agreed that ${shop} keeps this to answer you. You can withdraw that at any time; the shop then has nothing of it any more.`,
  withdrawLabel: "Withdraw and erase",
  reason: (shop) =>
    `You receive this once because somebody gave this address in a question to ${shop}. If that was not you, use the link: it erases the question.`,
}

import type { EnquiryCopyMessages } from "./enquiry-copy-messages"

export const es: EnquiryCopyMessages = {
  subject: (shop) => `Su pregunta a ${shop}`,
  greeting: (name) => (name ? `Hola, ${name}:` : "Hola:"),
  received: (shop) => `${shop} tiene su pregunta y le responderá a esta dirección. Esta es su copia.`,
  message: (text) => `Usted escribió:\n${text}`,
  tank: "Los datos que la acompañaban:",
  figures: {
    volume_l: (value) => `Volumen: ${value} L`,
    ph: (value) => `pH: ${value}`,
    kh_dkh: (value) => `Dureza de carbonatos: ${value} dKH`,
    temperature_c: (value) => `Temperatura: ${value} °C`,
  },
  withdraw: (shop) =>
    `Usted aceptó que ${shop} conserve esto para responderle. Puede retirarlo en cualquier momento; la tienda ya no tendrá nada de ello.`,
  withdrawLabel: "Retirar y borrar",
  reason: (shop) =>
    `Recibe esto una sola vez porque alguien indicó esta dirección en una pregunta a ${shop}. Si no fue usted, use el enlace: borra la pregunta.`,
}

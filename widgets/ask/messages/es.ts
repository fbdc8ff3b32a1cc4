import type { AskMessages } from "./ask-messages"

export const messages: AskMessages = {
  title: (shop) => `Preguntar a ${shop}`,
  lead: "Los datos de arriba acompañan su pregunta. La respuesta llega por correo electrónico.",
  name: "Su nombre",
  optional: "opcional",
  email: "Su correo electrónico",
  message: "Su pregunta",
  privacy: (shop) => `Cómo trata ${shop} los datos personales`,
  newTab: "se abre en otra pestaña",
  send: "Enviar la pregunta",
  sending: "Enviando …",
  sent: (shop, email) => `${shop} tiene su pregunta. Una copia va de camino a ${email}.`,
  failed:
    "No se pudo enviar su pregunta. Todo lo que escribió sigue aquí: inténtelo de nuevo en unos minutos.",
  problems: {
    name: "Use como máximo 100 caracteres en una sola línea.",
    email_empty: "Escriba la dirección a la que debe llegar la respuesta.",
    email: "Escriba una dirección como nombre@example.org.",
    message_empty: "Escriba lo que desea saber.",
    message: "Use como máximo 4.000 caracteres.",
    consent: "Marque esta casilla; sin ella la tienda no puede guardar su pregunta ni responderla.",
    new_words: "Este texto ha cambiado entretanto. Léalo de nuevo y marque la casilla.",
  },
}

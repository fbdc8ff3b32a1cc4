import type { SharedMessages } from "./shared-messages"

export const shared: SharedMessages = {
  problems: {
    empty: (field) => `${field}: escriba un número.`,
    not_a_number: (field) => `${field}: use cifras y un solo signo decimal, por ejemplo 6,8.`,
    too_low: (field, limit) => `${field}: escriba ${limit} o más.`,
    too_high: (field, limit) => `${field}: escriba ${limit} o menos.`,
  },
  unitOf: (field) => `Unidad: ${field}`,
  severity: { info: "Nota", warning: "Precaución", danger: "Peligro" },
  cautionsTitle: "Tenga en cuenta",
  lastResult: "Este es el último resultado que se pudo calcular.",
  resting: "La calculadora descansa un momento. Su último resultado sigue aquí.",
  closed: "La calculadora no está disponible en este momento.",
  tryAgain: "Volver a intentarlo",
  methodTitle: "Cómo se calcula",
  sourcesTitle: "Fuentes",
  engine: (version) => `Motor ${version}`,
  ask: "Preguntar a la tienda",
  askFailed: "No se pudo cargar el formulario. Inténtelo de nuevo en un momento.",
  credit: "Calculado con Tarnwright",
}

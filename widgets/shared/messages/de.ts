import type { SharedMessages } from "./shared-messages"

export const shared: SharedMessages = {
  problems: {
    empty: (field) => `${field}: Bitte eine Zahl eingeben.`,
    not_a_number: (field) => `${field}: Nur Ziffern und ein Dezimalzeichen verwenden, etwa 6,8.`,
    too_low: (field, limit) => `${field}: Bitte mindestens ${limit} eingeben.`,
    too_high: (field, limit) => `${field}: Bitte höchstens ${limit} eingeben.`,
  },
  unitOf: (field) => `Einheit: ${field}`,
  severity: { info: "Hinweis", warning: "Vorsicht", danger: "Gefahr" },
  cautionsTitle: "Zu beachten",
  lastResult: "Dies ist das letzte Ergebnis, das sich berechnen ließ.",
  resting: "Der Rechner macht eine kurze Pause. Ihr letztes Ergebnis bleibt stehen.",
  closed: "Der Rechner steht gerade nicht zur Verfügung.",
  tryAgain: "Noch einmal versuchen",
  methodTitle: "So wird gerechnet",
  sourcesTitle: "Quellen",
  engine: (version) => `Rechenkern ${version}`,
  ask: "Den Laden fragen",
  askFailed: "Das Formular ließ sich nicht laden. Versuchen Sie es gleich noch einmal.",
  credit: "Berechnet mit Tarnwright",
}

import type { SharedMessages } from "./shared-messages"

export const shared: SharedMessages = {
  problems: {
    empty: (field) => `${field}: enter a number.`,
    not_a_number: (field) => `${field}: use digits and one decimal mark, such as 6.8.`,
    too_low: (field, limit) => `${field}: enter ${limit} or more.`,
    too_high: (field, limit) => `${field}: enter ${limit} or less.`,
  },
  unitOf: (field) => `Unit: ${field}`,
  severity: { info: "Note", warning: "Caution", danger: "Danger" },
  cautionsTitle: "Keep in mind",
  lastResult: "This is the last result that could be worked out.",
  resting: "The calculator is resting for a moment. Your last result stays here.",
  closed: "The calculator is not available right now.",
  tryAgain: "Try again",
  methodTitle: "How this is worked out",
  sourcesTitle: "Sources",
  engine: (version) => `Engine ${version}`,
  ask: "Ask the shop",
  askFailed: "The form could not be brought. Try again in a moment.",
  credit: "Calculated by Tarnwright",
}

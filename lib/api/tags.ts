/** The chapters of the reference, in their order. */
export const tags = {
  Carbonate: "What pH, carbonate hardness and CO2 say about each other",
  Gas: "How much gas, for how long, at which pressure, and how safely",
  Flow: "What the filter pushes through the hose and the reactor",
  Plan: "The whole job, from the tank to the parts list",
  Batch: "Many calculations in one call",
  Reports: "Results kept with their engine version, to read, print and share",
  Catalogue: "Your own parts, and which of them fit a tank",
  Widgets: "What a widget on a shop's page calls",
  Enquiries: "What shoppers asked you, with their consent",
  Insights: "What your customers' tanks look like, never who they are",
  Webhooks: "Where we tell you what happened",
  Account: "Your account and what it has used",
  Service: "The service itself",
} as const

export type Tag = keyof typeof tags

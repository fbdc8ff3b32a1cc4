/** What can be kept as a report, each with the name that it goes by on paper. */
export const reportKinds = {
  plan: "Plan of a CO2 system",
  carbonate_co2: "CO2 level from pH and KH",
  carbonate_ph: "pH for a CO2 level",
  gas_lead_time: "When to open the gas before the lights",
  gas_cylinder: "How long a cylinder lasts",
  gas_room_safety: "The cylinder in its room",
  flow_operating_point: "Flow of a filter through its loop",
  flow_reactor: "A reactor on its filter",
} as const

export type ReportKind = keyof typeof reportKinds

export const reportKindNames = Object.keys(reportKinds) as [ReportKind, ...ReportKind[]]

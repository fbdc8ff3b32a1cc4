/** The calculators that a widget can be. The name is the folder in `widgets/` and stands in the database. */
export const calculators = ["co2-level"] as const

export type Calculator = (typeof calculators)[number]

/** Where a number of the engine comes from. Every room of the engine cites from this one table. */
export interface Source {
  readonly title: string
  readonly year: number
  readonly detail: string
}

export const sources = {
  plummerBusenberg1982: {
    title: "Plummer & Busenberg, Geochimica et Cosmochimica Acta 46:1011-1040",
    year: 1982,
    detail: "K1, K2 and Henry's constant of CO2, 0-90 °C",
  },
} as const satisfies Record<string, Source>

export type SourceId = keyof typeof sources

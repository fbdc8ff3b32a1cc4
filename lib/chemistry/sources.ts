import { gasSources } from "./sources-gas"

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
  kell1975: {
    title: "Kell, Journal of Chemical and Engineering Data 20:97-105",
    year: 1975,
    detail: "Density of water, eq. 16",
  },
  patek2009: {
    title:
      "Pátek, Hrubý, Klomfar, Součková & Harvey, Journal of Physical and Chemical Reference Data 38:21-29",
    year: 2009,
    detail: "Viscosity of water at 0.1 MPa (IAPWS SR6-08)",
  },
  iapws1976: {
    title: "IAPWS R1-76, Release on Surface Tension of Ordinary Water Substance",
    year: 2014,
    detail: "Surface tension of water, revision of 2014",
  },
  ...gasSources,
} as const satisfies Record<string, Source>

export type SourceId = keyof typeof sources

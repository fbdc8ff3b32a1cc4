import type { Source } from "./sources"

/** Sources of the flow room: friction, fittings, pump curve and reactor. */
export const flowSources = {
  hagenPoiseuille: {
    title: "Hagen 1839 and Poiseuille 1840, laminar flow in a tube",
    year: 1840,
    detail: "f = 64/Re, exact for developed laminar flow",
  },
  colebrook1939: {
    title: "Colebrook, Journal of the Institution of Civil Engineers 11:133-156",
    year: 1939,
    detail: "Turbulent friction between smooth and rough",
  },
  swameeJain1976: {
    title: "Swamee & Jain, Journal of the Hydraulics Division ASCE 102:657-664",
    year: 1976,
    detail: "Explicit friction factor, the first guess of the Colebrook solution",
  },
  white2011: {
    title: "White, Fluid Mechanics, 7th edition",
    year: 2011,
    detail: "Table 6.1 roughness of drawn tubing 0.0015 mm; eq. 6.101 sudden expansion",
  },
  craneTp410: {
    title: "Crane, Technical Paper 410, Flow of Fluids",
    year: 2009,
    detail: "Loss coefficients of entrances, exits, contractions and bends",
  },
  idelchik2007: {
    title: "Idelchik, Handbook of Hydraulic Resistance, 4th edition",
    year: 2007,
    detail: "Discharge through orifices; corrugated hoses",
  },
  hooper1981: {
    title: "Hooper, Chemical Engineering 88(17):96-100",
    year: 1981,
    detail: "Fittings lose more than their turbulent K below Re 2,000",
  },
  ayer1955: {
    title: "Ayer, Brunk, Ewing, Reid & Silverman, Annals of Mathematical Statistics 26:641-647",
    year: 1955,
    detail: "Pooling adjacent violators: the nearest monotone sequence",
  },
  fritschCarlson1980: {
    title: "Fritsch & Carlson, SIAM Journal on Numerical Analysis 17:238-246",
    year: 1980,
    detail: "Monotone piecewise cubic interpolation",
  },
  pumpAffinity: {
    title: "Affinity laws of centrifugal pumps (White, Fluid Mechanics, eq. 11.28)",
    year: 2011,
    detail: "Flow follows the speed, head its square, power its cube",
  },
  bin1993: {
    title: "Biń, Chemical Engineering Science 48:3585-3630",
    year: 1993,
    detail: "Onset of gas entrainment by a plunging liquid jet, 0.8 to 1.0 m/s",
  },
  engineeringJudgement: {
    title: "Engineering judgement, no publication",
    year: 2026,
    detail: "A value with its range that the person may replace by a measurement",
  },
} as const satisfies Record<string, Source>

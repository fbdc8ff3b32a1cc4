import type { Source } from "./sources"

/** Sources of the water and its carbonate system. */
export const carbonateSources = {
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
  millero1995: {
    title: "Millero, Geochimica et Cosmochimica Acta 59:661-677",
    year: 1995,
    detail: "Ion product of water, eq. 63 at zero salinity",
  },
  truesdellJones1974: {
    title: "Truesdell & Jones, Journal of Research of the U.S. Geological Survey 2:233-248",
    year: 1974,
    detail: "Activity coefficients and Debye-Hückel constants, up to 0.05 mol/L",
  },
  parkhurstAppelo2013: {
    title: "Parkhurst & Appelo, U.S. Geological Survey Techniques and Methods 6-A43",
    year: 2013,
    detail: "PHREEQC 3 and its database: ion sizes; the oracle of the reference rows",
  },
  bradleyPitzer1979: {
    title: "Bradley & Pitzer, Journal of Physical Chemistry 83:1599-1603",
    year: 1979,
    detail: "Dielectric constant of water",
  },
  weissPrice1980: {
    title: "Weiss & Price, Marine Chemistry 8:347-359",
    year: 1980,
    detail: "Vapour pressure of water, eq. 10",
  },
  ballNordstrom1991: {
    title: "Ball & Nordstrom, U.S. Geological Survey Open-File Report 91-183",
    year: 1991,
    detail: "WATEQ4F: second dissociation of phosphoric acid",
  },
  marionBabcock1976: {
    title: "Marion & Babcock, Soil Science 122:181-187",
    year: 1976,
    detail: "Ionic strength from conductivity at 25 °C",
  },
  langelier1936: {
    title: "Langelier, Journal of the American Water Works Association 28:1500-1521",
    year: 1936,
    detail: "Ionic strength from dissolved solids, 2.5e-5 mol/L per mg/L (constant recalled, not re-read)",
  },
  oliverThurmanMalcolm1983: {
    title: "Oliver, Thurman & Malcolm, Geochimica et Cosmochimica Acta 47:2031-2035",
    year: 1983,
    detail: "Acidity of humic substances: about 10 µeq per mg of organic carbon",
  },
  iso2533: {
    title: "ISO 2533, Standard Atmosphere",
    year: 1975,
    detail: "Air pressure at altitude",
  },
  lan2025: {
    title: "Lan, Tans & Thoning, NOAA Global Monitoring Laboratory, Trends in globally-averaged CO2",
    year: 2025,
    detail: "CO2 in outdoor air, about 425 ppm (recalled, not re-read)",
  },
  crcIndicators2016: {
    title: "CRC Handbook of Chemistry and Physics, 97th edition, acid-base indicators",
    year: 2016,
    detail: "Bromothymol blue: yellow at pH 6.0, blue at 7.6",
  },
  crank1975: {
    title: "Crank, The Mathematics of Diffusion, 2nd edition",
    year: 1975,
    detail: "Chapter 4: diffusion into a layer with one open face",
  },
  ciaaw2021: {
    title:
      "IUPAC Commission on Isotopic Abundances and Atomic Weights, Pure and Applied Chemistry 94:573-600",
    year: 2022,
    detail: "Abridged standard atomic weights: C 12.011, O 15.999, H 1.008, Ca 40.078, P 30.974",
  },
  treanor2020: {
    title: "Treanor and others, Journal of Fish and Wildlife Management 11:463-474",
    year: 2020,
    detail: "Deaths of trout from 150 mg/L CO2 and of carp and channel catfish from 225 mg/L within 24 h",
  },
  wedemeyer1996: {
    title: "Wedemeyer, Physiology of Fish in Intensive Culture Systems",
    year: 1996,
    detail: "Not above 20 to 30 mg/L CO2 for long periods with warm-water fish (read in a later report)",
  },
  brent1973: {
    title: "Brent, Algorithms for Minimization without Derivatives",
    year: 1973,
    detail: "Chapter 4: the bracketed root finder",
  },
} as const satisfies Record<string, Source>

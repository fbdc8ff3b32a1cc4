import type { Source } from "./sources"

/** Sources of the gas room: exchange with the air, bubbles, cylinder, pressure and room. */
export const gasSources = {
  jahne1987: {
    title: "Jähne, Heinz & Dietrich, Journal of Geophysical Research 92(C10):10767-10776",
    year: 1987,
    detail: "Diffusivity of CO2 in water",
  },
  jahneExchange1987: {
    title:
      "Jähne, Münnich, Bösinger, Dutzi, Huber & Libner, Journal of Geophysical Research 92(C2):1937-1949",
    year: 1987,
    detail: "Exponent of the Schmidt number: 2/3 on a calm surface, 1/2 on a rippled one",
  },
  wanninkhof2014: {
    title: "Wanninkhof, Limnology and Oceanography: Methods 12:351-362",
    year: 2014,
    detail: "Table 1: Schmidt number of CO2 in fresh water, -2 to 40 °C",
  },
  coleCaraco1998: {
    title: "Cole & Caraco, Limnology and Oceanography 43:647-656",
    year: 1998,
    detail: "Gas transfer of a lake without wind: k600 about 2 cm/h",
  },
  cliftGraceWeber1978: {
    title: "Clift, Grace & Weber, Bubbles, Drops and Particles",
    year: 1978,
    detail: "Chapter 7: rise of bubbles in contaminated water (eqs 7-3 to 7-5)",
  },
  schillerNaumann1935: {
    title: "Schiller & Naumann, Zeitschrift des Vereines Deutscher Ingenieure 77:318-320",
    year: 1935,
    detail: "Drag of a rigid sphere",
  },
  mendelson1967: {
    title: "Mendelson, AIChE Journal 13:250-253",
    year: 1967,
    detail: "Rise of bubbles in clean water, the upper bound",
  },
  frossling1938: {
    title: "Frössling, Gerlands Beiträge zur Geophysik 52:170-216",
    year: 1938,
    detail: "Mass transfer of a rigid sphere: Sh = 2 + 0.552 Re^(1/2) Sc^(1/3)",
  },
  higbie1935: {
    title: "Higbie, Transactions of the AIChE 31:365-389",
    year: 1935,
    detail: "Mass transfer of a mobile surface, the upper bound",
  },
  tate1864: {
    title: "Tate, Philosophical Magazine 27:176-180",
    year: 1864,
    detail: "Volume of a bubble or drop that leaves a tube",
  },
  landoOakley1967: {
    title: "Lando & Oakley, Journal of Colloid and Interface Science 25:526-530",
    year: 1967,
    detail: "Polynomial of the Harkins and Brown correction, 0.3 < R/V^(1/3) < 1.2",
  },
  tsonopoulos1974: {
    title: "Tsonopoulos, AIChE Journal 20:263-272 (after Pitzer & Curl)",
    year: 1974,
    detail: "Second virial coefficient from critical constants",
  },
  spanWagner1996: {
    title: "Span & Wagner, Journal of Physical and Chemical Reference Data 25:1509-1596",
    year: 1996,
    detail: "Equation of state of CO2; saturation line, eqs 3.13 to 3.15",
  },
  adrP200: {
    title: "ADR, 4.1.4.1 packing instruction P200",
    year: 2025,
    detail: "UN 1013: filling ratio 0.68 kg/L at a test pressure of 190 bar, 0.76 kg/L at 250 bar",
  },
  cfr173304a: {
    title: "49 CFR 173.304a",
    year: 2024,
    detail: "Filling density of carbon dioxide cylinders, 68 % of the water capacity",
  },
  youngLaplace: {
    title:
      "Young 1805 and Laplace 1806, as in de Gennes, Brochard-Wyart & Quéré, Capillarity and Wetting Phenomena",
    year: 2004,
    detail: "Pressure that opens a pore under water: 4σ/d",
  },
  fenghour1998: {
    title: "Fenghour, Wakeham & Vesovic, Journal of Physical and Chemical Reference Data 27:31-44",
    year: 1998,
    detail: "Viscosity of CO2",
  },
  nioshCarbonDioxide: {
    title: "NIOSH Pocket Guide to Chemical Hazards, carbon dioxide",
    year: 2019,
    detail: "REL 5,000 ppm over 8 h, short term 30,000 ppm, immediately dangerous 40,000 ppm",
  },
  eu200615: {
    title: "Commission Directive 2006/15/EC",
    year: 2006,
    detail: "Indicative occupational exposure limit of carbon dioxide, 5,000 ppm (9,000 mg/m³) over 8 h",
  },
} as const satisfies Record<string, Source>

import { shared } from "@/widgets/shared/messages/es"
import type { Co2LevelMessages } from "./co2-level-messages"

export const messages: Co2LevelMessages = {
  shared,
  title: "Nivel de CO2",
  fields: {
    ph: "pH del agua del acuario",
    kh_dkh: "Dureza de carbonatos (KH)",
    temperature_c: "Temperatura del agua",
  },
  levels: { low: "bajo", in_range: "en rango", high: "alto", dangerous: "peligroso" },
  figureTitle: "CO2 en esta agua",
  interval: ({ low, high }) => (low === null ? `como máximo ${high} mg/L` : `entre ${low} y ${high} mg/L`),
  sentence: ({ ph, kh, temperature, co2, low, high, level }) =>
    `Con pH ${ph}, ${kh} y ${temperature} el agua contiene unos ${co2} mg/L de CO2, ` +
    `${low === null ? `y como máximo ${high} mg/L` : `y con un 95\u00a0% de certeza entre ${low} y ${high} mg/L`}. ` +
    `Nivel según el extremo superior: ${level}.`,
  setPoint: ({ target, ph }) => `Para ${target} mg/L, ajuste el controlador a pH ${ph}.`,
  setPointInterval: ({ low, high }) => `Su medidor puede marcar entonces entre ${low} y ${high}.`,
  mapTitle: "Dónde está esta agua",
  tableTitle: "El pH de cada nivel de CO2 con esta KH",
  measuredTitle: "Cómo ha medido",
  phMeter: "pH medido con",
  phMeters: {
    bench: "medidor de laboratorio, recién calibrado",
    pen: "medidor de bolsillo o sonda",
    liquid: "test líquido",
  },
  khTest: "KH medida con",
  khTests: { fine: "test de gotas, 0,5 dKH por gota", coarse: "test de gotas, 1 dKH por gota" },
  cautions: {
    livestock_30: ({ high }) =>
      `Puede haber hasta ${high} mg/L de CO2. Los peces sanos suelen tolerarlo; la falta de oxígeno, la noche y las especies sensibles lo cambian.`,
    livestock_40: ({ high }) =>
      `Puede haber hasta ${high} mg/L de CO2, más de los 30 mg/L que se buscan en un acuario plantado. Mida de otra manera antes de añadir gas.`,
    livestock_60: ({ high }) =>
      `Puede haber hasta ${high} mg/L de CO2. Por encima de 40 mg/L muchos peces y gambas sufren: dé menos gas, airee y vigile si boquean en la superficie o respiran deprisa.`,
    livestock_above: ({ high }) =>
      `Puede haber hasta ${high} mg/L de CO2, lo que puede matar. Si hay animales en el acuario, corte el gas y airee hasta que una medida más segura muestre menos.`,
    raise_slowly: () =>
      "Suba el CO2 en pasos pequeños durante varios días y observe a los animales después de cada paso. Si boquean o se quedan quietos, corte el gas y airee.",
    upper_bound_only: () =>
      "Con este test la KH podría ser también nula; solo el límite superior significa algo. Valore una muestra mayor.",
    no_upper_bound: ({ high }) =>
      `Estas medidas no ponen límite superior al CO2: ${high} mg/L es lo máximo que el gas puro puede dar al agua. Mida el pH y la KH con más exactitud.`,
    outside_design_range: () =>
      "Está fuera del agua habitual de acuario (pH de 5,8 a 8,4; de 0,5 a 20 dKH; de 10 a 35 °C). Allí las medidas son menos fiables.",
    acid_or_hydroxide: () => "Tan lejos del punto neutro el resultado depende de una medida de pH muy buena.",
    low_kh: ({ kh }) =>
      `Con ${kh} una gota del test es una gran parte de la medida. Valore una muestra mayor o use un indicador permanente.`,
    borate: () => "Por encima de pH 8 el boro del agua cuenta como dureza y hace leer demasiado CO2.",
    ph_is_no_proof: () =>
      "El pH solo demuestra el CO2 donde no actúa otro ácido ni tampón. La turba, los troncos y el fosfato hacen leer demasiado CO2. Compruébelo con un indicador permanente.",
    common_chart: () =>
      "Una tabla impresa de pH y KH muestra otro valor (normalmente una décima parte menos): no tiene en cuenta la temperatura ni las sales.",
    calibrate_probe: () =>
      "Una sonda con un error de 0,1 cambia el CO2 en una cuarta parte; con 0,3 lo duplica o lo reduce a la mitad. Calíbrela antes de ajustar el controlador.",
    below_air: () =>
      "El aire por sí solo da a esta agua más CO2 que el objetivo. Añadir gas no puede bajarlo.",
  },
  impossible: {
    ph: "El pH y la KH no pueden ser ambos así: el agua tendría que contener más CO2 del que puede darle el gas puro. Revise el medidor de pH y el test de KH.",
    kh_dkh: "El pH y la KH no pueden ser ambos así: no quedaría carbonato. Vuelva a medir la KH.",
  },
  method:
    "A partir del equilibrio de carbonatos a su temperatura, corregido por las sales que acompañan a esta KH. El intervalo procede de su propio medidor y test y contiene el valor verdadero 95 veces de cada 100; el nivel se juzga por su extremo superior, para que una medida incierta nunca parezca más segura de lo que es.",
}

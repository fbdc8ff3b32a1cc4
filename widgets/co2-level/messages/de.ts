import { shared } from "@/widgets/shared/messages/de"
import type { Co2LevelMessages } from "./co2-level-messages"

export const messages: Co2LevelMessages = {
  shared,
  title: "CO2-Gehalt",
  fields: { ph: "pH des Aquarienwassers", kh_dkh: "Karbonathärte (KH)", temperature_c: "Wassertemperatur" },
  levels: { low: "niedrig", in_range: "im Zielbereich", high: "hoch", dangerous: "gefährlich" },
  figureTitle: "CO2 in diesem Wasser",
  interval: ({ low, high }) => (low === null ? `höchstens ${high} mg/L` : `zwischen ${low} und ${high} mg/L`),
  sentence: ({ ph, kh, temperature, co2, low, high, level }) =>
    `Bei pH ${ph}, ${kh} und ${temperature} enthält das Wasser etwa ${co2} mg/L CO2, ` +
    `${low === null ? `höchstens aber ${high} mg/L` : `mit 95\u00a0% Sicherheit zwischen ${low} und ${high} mg/L`}. ` +
    `Nach dem oberen Ende beurteilt ist das ${level}.`,
  setPoint: ({ target, ph }) => `Für ${target} mg/L den Regler auf pH ${ph} stellen.`,
  setPointInterval: ({ low, high }) => `Ihr Messgerät kann dann zwischen ${low} und ${high} anzeigen.`,
  mapTitle: "Wo dieses Wasser liegt",
  tableTitle: "Der pH für jeden CO2-Gehalt bei dieser KH",
  measuredTitle: "So haben Sie gemessen",
  phMeter: "pH gemessen mit",
  phMeters: {
    bench: "Labormessgerät, frisch kalibriert",
    pen: "Messstift oder Sonde",
    liquid: "Tröpfchentest",
  },
  khTest: "KH gemessen mit",
  khTests: { fine: "Tropfentest, 0,5 dKH je Tropfen", coarse: "Tropfentest, 1 dKH je Tropfen" },
  cautions: {
    livestock_30: ({ high }) =>
      `Es können bis zu ${high} mg/L CO2 sein. Gesunde Fische vertragen das meist; Sauerstoffmangel, die Nacht und empfindliche Arten ändern das.`,
    livestock_40: ({ high }) =>
      `Es können bis zu ${high} mg/L CO2 sein, mehr als die 30 mg/L, die man für Pflanzenbecken anstrebt. Messen Sie auf einem zweiten Weg, bevor Sie mehr Gas geben.`,
    livestock_60: ({ high }) =>
      `Es können bis zu ${high} mg/L CO2 sein. Über 40 mg/L leiden viele Fische und Garnelen: weniger Gas geben, belüften und auf Luftschnappen und schnelle Atmung achten.`,
    livestock_above: ({ high }) =>
      `Es können bis zu ${high} mg/L CO2 sein; das kann töten. Sind Tiere im Becken, das Gas abstellen und belüften, bis eine sicherere Messung weniger zeigt.`,
    raise_slowly: () =>
      "CO2 über mehrere Tage in kleinen Schritten erhöhen und die Tiere nach jedem Schritt beobachten. Schnappen sie nach Luft oder liegen sie still, das Gas abstellen und belüften.",
    upper_bound_only: () =>
      "Mit diesem Test könnte die KH auch null sein; nur die obere Grenze sagt etwas aus. Eine größere Probe titrieren.",
    no_upper_bound: ({ high }) =>
      `Diese Messwerte geben keine Obergrenze her: ${high} mg/L sind so viel, wie reines Gas dem Wasser geben kann. pH und KH genauer messen.`,
    outside_design_range: () =>
      "Das liegt außerhalb üblichen Aquarienwassers (pH 5,8 bis 8,4; 0,5 bis 20 dKH; 10 bis 35 °C). Messwerten ist dort weniger zu trauen.",
    acid_or_hydroxide: () => "So weit vom Neutralpunkt hängt das Ergebnis an einer sehr guten pH-Messung.",
    low_kh: ({ kh }) =>
      `Bei ${kh} ist ein Tropfen des Tests ein großer Teil des Messwerts. Eine größere Probe titrieren oder einen Dauertest verwenden.`,
    borate: () => "Über pH 8 zählt Bor im Wasser als Härte und täuscht zu viel CO2 vor.",
    ph_is_no_proof: () =>
      "Ein pH-Wert belegt CO2 nur, wo keine andere Säure und kein Puffer wirkt. Torf, Wurzeln und Phosphat täuschen zu viel CO2 vor. Mit einem Dauertest gegenprüfen.",
    common_chart: () =>
      "Eine gedruckte pH-KH-Tabelle zeigt einen anderen Wert (meist ein Zehntel weniger): Sie lässt Temperatur und Salze weg.",
    calibrate_probe: () =>
      "Eine um 0,1 falsche Sonde ändert das CO2 um ein Viertel, um 0,3 verdoppelt oder halbiert sie es. Vor dem Einstellen des Reglers kalibrieren.",
    below_air: () =>
      "Schon die Luft gibt diesem Wasser mehr CO2 als das Ziel. Mit Gas lässt es sich nicht senken.",
  },
  impossible: {
    ph: "pH und KH können nicht beide stimmen: Das Wasser müsste mehr CO2 enthalten, als reines Gas ihm geben kann. pH-Messgerät und KH-Test prüfen.",
    kh_dkh: "pH und KH können nicht beide stimmen: Es bliebe kein Karbonat übrig. KH neu messen.",
  },
  method:
    "Aus dem Karbonatgleichgewicht bei Ihrer Temperatur, berichtigt um die Salze, die zu dieser KH gehören. Der Bereich folgt aus Ihrem Messgerät und Ihrem Test und enthält den wahren Wert in 95 von 100 Fällen; beurteilt wird nach seinem oberen Ende, damit eine unsichere Messung nie sicherer aussieht, als sie ist.",
}

import { shared } from "@/widgets/shared/messages/ja"
import type { Co2LevelMessages } from "./co2-level-messages"

export const messages: Co2LevelMessages = {
  shared,
  title: "CO2濃度",
  fields: { ph: "飼育水のpH", kh_dkh: "炭酸塩硬度（KH）", temperature_c: "水温" },
  levels: { low: "低い", in_range: "適正", high: "高い", dangerous: "危険" },
  figureTitle: "この水のCO2",
  interval: ({ low, high }) => (low === null ? `${high} mg/L以下` : `${low}～${high} mg/Lの間`),
  sentence: ({ ph, kh, temperature, co2, low, high, level }) =>
    `pH ${ph}、${kh}、${temperature}では、この水のCO2はおよそ${co2} mg/Lで、` +
    `${low === null ? `最大でも${high} mg/Lです` : `95 %の確率で${low}～${high} mg/Lの間にあります`}。` +
    `上限で判断すると「${level}」です。`,
  setPoint: ({ target, ph }) => `${target} mg/Lにするには、コントローラーをpH ${ph}に設定します。`,
  setPointInterval: ({ low, high }) => `そのとき測定器の表示は${low}～${high}の間になります。`,
  mapTitle: "この水の位置",
  tableTitle: "このKHでのCO2濃度ごとのpH",
  measuredTitle: "測定の方法",
  phMeter: "pHの測定",
  phMeters: { bench: "校正したての卓上pH計", pen: "ペン型またはプローブ", liquid: "液体試薬" },
  khTest: "KHの測定",
  khTests: { fine: "滴定試薬（1滴0.5 dKH）", coarse: "滴定試薬（1滴1 dKH）" },
  cautions: {
    livestock_30: ({ high }) =>
      `CO2は${high} mg/Lに達している可能性があります。健康な魚は通常耐えられますが、酸素不足や夜間、敏感な種では異なります。`,
    livestock_40: ({ high }) =>
      `CO2は${high} mg/Lに達している可能性があり、水草水槽の目安の30 mg/Lを超えます。添加量を増やす前に別の方法でも測ってください。`,
    livestock_60: ({ high }) =>
      `CO2は${high} mg/Lに達している可能性があります。40 mg/Lを超えると多くの魚やエビが苦しみます。添加を減らし、エアレーションをして、鼻上げや速い呼吸に注意してください。`,
    livestock_above: ({ high }) =>
      `CO2は${high} mg/Lに達している可能性があり、死に至ることがあります。生き物がいる場合は添加を止め、より確かな測定で下がったとわかるまでエアレーションをしてください。`,
    raise_slowly: () =>
      "CO2は数日かけて少しずつ増やし、そのたびに生き物を観察してください。鼻上げや動かない様子が見られたら、添加を止めてエアレーションをしてください。",
    upper_bound_only: () =>
      "この試薬ではKHがゼロの可能性もあり、上限だけに意味があります。多めの水で滴定してください。",
    no_upper_bound: ({ high }) =>
      `この測定値からはCO2の上限が決まりません。${high} mg/Lは純粋なガスが水に溶ける最大量です。pHとKHをより正確に測ってください。`,
    outside_design_range: () =>
      "通常の飼育水（pH 5.8～8.4、0.5～20 dKH、10～35 °C）の範囲外です。測定値の信頼性が下がります。",
    acid_or_hydroxide: () => "中性からこれだけ離れると、結果はpHの測定精度に大きく左右されます。",
    low_kh: ({ kh }) =>
      `${kh}では試薬1滴が測定値の大きな割合を占めます。多めの水で滴定するか、ドロップチェッカーを使ってください。`,
    borate: () => "pH 8を超えるとホウ素が硬度として測られ、CO2が高めに出ます。",
    ph_is_no_proof: () =>
      "pHからCO2がわかるのは、ほかの酸や緩衝物質がないときだけです。ピート、流木、リン酸塩があるとCO2が高めに出ます。ドロップチェッカーで確かめてください。",
    common_chart: () =>
      "印刷されたpH・KH表とは値が異なります（通常は1割ほど低め）。表は水温と塩分を考慮していません。",
    calibrate_probe: () =>
      "プローブが0.1ずれるとCO2は約4分の1変わり、0.3ずれると倍または半分になります。コントローラーを設定する前に校正してください。",
    below_air: () => "この水は空気だけで目標より多くのCO2を含みます。添加しても下げることはできません。",
  },
  impossible: {
    ph: "このpHとKHは両立しません。純粋なCO2ガスでも溶かせない量になります。pH計とKH試薬を確かめてください。",
    kh_dkh: "このpHとKHは両立しません。炭酸塩が残らない計算になります。KHを測り直してください。",
  },
  method:
    "入力した水温での炭酸平衡から、このKHに伴う塩分を補正して計算します。範囲はお使いの測定器と試薬の誤差によるもので、100回中95回は真の値を含みます。不確かな測定が実際より安全に見えないよう、レベルは上限で判断します。",
}

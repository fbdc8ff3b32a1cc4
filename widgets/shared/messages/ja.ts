import type { SharedMessages } from "./shared-messages"

export const shared: SharedMessages = {
  problems: {
    empty: (field) => `${field}：数値を入力してください。`,
    not_a_number: (field) => `${field}：数字と小数点で入力してください（例：6.8）。`,
    too_low: (field, limit) => `${field}：${limit}以上を入力してください。`,
    too_high: (field, limit) => `${field}：${limit}以下を入力してください。`,
  },
  unitOf: (field) => `単位：${field}`,
  severity: { info: "メモ", warning: "注意", danger: "危険" },
  cautionsTitle: "ご注意",
  lastResult: "最後に計算できた結果を表示しています。",
  resting: "計算を少し休止しています。最後の結果はそのまま残ります。",
  closed: "現在この計算はご利用いただけません。",
  tryAgain: "もう一度試す",
  methodTitle: "計算の方法",
  sourcesTitle: "出典",
  engine: (version) => `エンジン ${version}`,
  ask: "お店に質問する",
  askFailed: "フォームを読み込めませんでした。少し待ってからもう一度お試しください。",
  credit: "計算：Tarnwright",
}

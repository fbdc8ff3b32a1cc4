import type { EnquiryCopyMessages } from "./enquiry-copy-messages"

export const ja: EnquiryCopyMessages = {
  subject: (shop) => `${shop}へのご質問（控え）`,
  greeting: (name) => (name ? `${name} 様` : "こんにちは。"),
  received: (shop) => `${shop}がご質問を受け取りました。このアドレスに回答をお送りします。こちらは控えです。`,
  message: (text) => `ご質問の内容：\n${text}`,
  tank: "一緒に送られた数値：",
  figures: {
    volume_l: (value) => `水量：${value} L`,
    ph: (value) => `pH：${value}`,
    kh_dkh: (value) => `炭酸塩硬度：${value} dKH`,
    temperature_c: (value) => `水温：${value} °C`,
  },
  withdraw: (shop) =>
    `回答のために${shop}がこの内容を保管することに同意いただきました。同意はいつでも取り消せます。取り消すと、店舗には何も残りません。`,
  withdrawLabel: "取り消して消去する",
  reason: (shop) =>
    `${shop}へのご質問でこのアドレスが入力されたため、一度だけお送りしています。お心当たりがない場合は、リンクから質問を消去してください。`,
}

import type { AskMessages } from "./ask-messages"

export const messages: AskMessages = {
  title: (shop) => `${shop}に質問する`,
  lead: "上の数値も質問と一緒に送られます。回答はメールで届きます。",
  name: "お名前",
  optional: "任意",
  email: "メールアドレス",
  message: "ご質問",
  privacy: (shop) => `${shop}の個人情報の取り扱い`,
  newTab: "新しいタブで開きます",
  send: "質問を送る",
  sending: "送信中…",
  sent: (shop, email) => `${shop}にご質問が届きました。控えを${email}にお送りしています。`,
  failed: "質問を送信できませんでした。入力した内容はそのまま残っています。数分後にもう一度お試しください。",
  problems: {
    name: "改行なしで100文字以内で入力してください。",
    email_empty: "回答を受け取るメールアドレスを入力してください。",
    email: "name@example.org のような形で入力してください。",
    message_empty: "知りたいことを入力してください。",
    message: "4,000文字以内で入力してください。",
    consent: "チェックを入れてください。同意がないと、店舗は質問を保管して回答することができません。",
    new_words: "この文面は変更されました。もう一度お読みのうえ、チェックを入れてください。",
  },
}

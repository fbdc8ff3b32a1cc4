import type { Language } from "@/lib/mail"

interface WithdrawWords {
  readonly title: (shop: string) => string
  readonly lead: (shop: string, day: string) => string
  readonly withdraw: string
  readonly gone: (shop: string) => string
  readonly failed: string
}

/** What the page says on which a shopper takes their enquiry back. */
export const words: Record<Language, WithdrawWords> = {
  en: {
    title: (shop) => `Your question to ${shop}`,
    lead: (shop, day) =>
      `You asked ${shop} something on ${day} and agreed that it is kept to answer you. Withdraw that, and your name, your address, your question and your tank’s figures are erased at once. ${shop} can then not answer you any more.`,
    withdraw: "Withdraw and erase",
    gone: (shop) => `It is erased. ${shop} has nothing of your question any more.`,
    failed: "It could not be erased just now. Try again in a minute.",
  },
  de: {
    title: (shop) => `Ihre Frage an ${shop}`,
    lead: (shop, day) =>
      `Sie haben ${shop} am ${day} etwas gefragt und zugestimmt, dass es gespeichert wird, um Ihnen zu antworten. Wenn Sie das widerrufen, werden Ihr Name, Ihre Adresse, Ihre Frage und die Werte Ihres Aquariums sofort gelöscht. ${shop} kann Ihnen dann nicht mehr antworten.`,
    withdraw: "Widerrufen und löschen",
    gone: (shop) => `Gelöscht. ${shop} hat nichts mehr von Ihrer Frage.`,
    failed: "Das ließ sich gerade nicht löschen. Versuchen Sie es in einer Minute noch einmal.",
  },
  es: {
    title: (shop) => `Su pregunta a ${shop}`,
    lead: (shop, day) =>
      `El ${day} preguntó algo a ${shop} y aceptó que se conserve para responderle. Si lo retira, su nombre, su dirección, su pregunta y los datos de su acuario se borran de inmediato. ${shop} ya no podrá responderle.`,
    withdraw: "Retirar y borrar",
    gone: (shop) => `Borrado. ${shop} ya no tiene nada de su pregunta.`,
    failed: "No se pudo borrar ahora. Inténtelo de nuevo en un minuto.",
  },
  ja: {
    title: (shop) => `${shop}へのご質問`,
    lead: (shop, day) =>
      `${day}に${shop}へ質問し、回答のために保管することに同意されました。同意を取り消すと、お名前、メールアドレス、ご質問、水槽の数値はただちに消去され、${shop}は回答できなくなります。`,
    withdraw: "取り消して消去する",
    gone: (shop) => `消去しました。${shop}にはご質問の内容は残っていません。`,
    failed: "ただいま消去できませんでした。1分ほど待ってからもう一度お試しください。",
  },
}

export function isLanguage(tag: string): tag is Language {
  return Object.hasOwn(words, tag)
}

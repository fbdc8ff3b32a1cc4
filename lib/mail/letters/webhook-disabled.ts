import type { Letter } from "../compose"

export interface WebhookDisabledData {
  account_name: string
  url: string
  webhooks_url: string
}

export function webhookDisabled({ account_name, url, webhooks_url }: WebhookDisabledData): Letter {
  return {
    subject: `A webhook endpoint of ${account_name} was switched off`,
    paragraphs: [
      `The endpoint ${url} answered 410, which says that it wants no more webhooks. We switched it off.`,
      "If that was not meant, mend the receiver and switch the endpoint on again. Deliveries that failed can be sent once more.",
    ],
    action: { label: "See your webhooks", url: webhooks_url },
    reason: `You receive this as an owner of ${account_name}.`,
  }
}

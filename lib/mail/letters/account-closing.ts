import type { Letter } from "../compose"

export interface AccountClosingData {
  account_name: string
  /** RFC 3339. */
  deleted_on: string
  settings_url: string
}

const day = new Intl.DateTimeFormat("en-GB", {
  day: "numeric",
  month: "long",
  year: "numeric",
  timeZone: "UTC",
})

export function accountClosing({ account_name, deleted_on, settings_url }: AccountClosingData): Letter {
  return {
    subject: `${account_name} will be deleted on ${day.format(new Date(deleted_on))}`,
    paragraphs: [
      `An owner of ${account_name} has closed it. Its keys and widgets have stopped, and its subscription is not renewed.`,
      `On ${day.format(new Date(deleted_on))} everything in it is deleted for good. Until then any owner can take this back.`,
    ],
    action: { label: "Keep the account", url: settings_url },
    reason: `You receive this as an owner of ${account_name}.`,
  }
}

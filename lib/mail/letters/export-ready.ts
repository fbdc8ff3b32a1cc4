import type { Letter } from "../compose"

export interface ExportReadyData {
  name: string
  account_name: string
  days: number
  url: string
}

export function exportReady({ name, account_name, days, url }: ExportReadyData): Letter {
  return {
    subject: `The data of ${account_name} is ready`,
    paragraphs: [
      `Hello ${name},`,
      `the archive of ${account_name} that you asked for is ready. You can fetch it for ${days} days, signed in as an owner.`,
    ],
    action: { label: "Fetch the archive", url },
    reason: `You receive this because you asked for the data of ${account_name}.`,
  }
}

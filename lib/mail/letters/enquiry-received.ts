import type { Letter } from "../compose"

export interface EnquiryReceivedData {
  account_name: string
  widget_name: string
  enquiry_url: string
}

export function enquiryReceived({ account_name, widget_name, enquiry_url }: EnquiryReceivedData): Letter {
  return {
    subject: `A shopper asks ${account_name}`,
    paragraphs: [
      `A shopper wrote to you through the widget “${widget_name}”.`,
      "What they wrote and how to answer them is in the portal. It is not in this mail, so that it is gone once it is erased there.",
    ],
    action: { label: "Read the enquiry", url: enquiry_url },
    reason: `You receive this as an owner or a merchandiser of ${account_name}.`,
  }
}

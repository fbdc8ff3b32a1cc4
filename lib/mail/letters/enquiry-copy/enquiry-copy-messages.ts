/** What a shopper's copy of their enquiry says. Figures arrive written for the language. */
export interface EnquiryCopyMessages {
  readonly subject: (shop: string) => string
  readonly greeting: (name: string | null) => string
  readonly received: (shop: string) => string
  readonly message: (text: string) => string
  /** Heads the figures of the tank, a line each. */
  readonly tank: string
  readonly figures: Readonly<
    Record<"volume_l" | "ph" | "kh_dkh" | "temperature_c", (value: string) => string>
  >
  readonly withdraw: (shop: string) => string
  readonly withdrawLabel: string
  readonly reason: (shop: string) => string
}

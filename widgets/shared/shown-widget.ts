/** What the service says about a widget. Everything but the calculator may be missing: an older answer lacks it. */
export interface ShownWidget {
  readonly calculator: string
  readonly settings?: {
    readonly language?: string
    readonly theme?: string
    readonly kh_unit?: string
    readonly temperature_unit?: string
    readonly start?: Readonly<Record<string, number>>
    /** The page that says how the shop treats personal data; null: it takes no questions. */
    readonly enquiries?: { readonly privacy_url: string } | null
    /** Whether the widget may tell what tanks it was asked about. */
    readonly statistics?: boolean
    readonly link?: { readonly label: string; readonly url: string } | null
  }
  readonly credit_line?: boolean
}

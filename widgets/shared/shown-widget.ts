/** What the service says about a widget. Everything but the calculator may be missing: an older answer lacks it. */
export interface ShownWidget {
  readonly calculator: string
  readonly settings?: {
    readonly language?: string
    readonly theme?: string
    readonly kh_unit?: string
    readonly temperature_unit?: string
    readonly start?: Readonly<Record<string, number>>
    readonly link?: { readonly label: string; readonly url: string } | null
  }
  readonly credit_line?: boolean
}

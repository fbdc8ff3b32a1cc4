/** What Next hands to a page that reads its query. */
export interface WithQuery {
  searchParams: Promise<Record<string, string | string[] | undefined>>
}

/** What Next hands to a page or layout of an account. */
export interface OfAccount {
  params: Promise<{ account: string }>
}

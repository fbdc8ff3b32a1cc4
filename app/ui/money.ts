const dollars = new Intl.NumberFormat("en-US", { style: "currency", currency: "USD" })
const wholeDollars = new Intl.NumberFormat("en-US", {
  style: "currency",
  currency: "USD",
  maximumFractionDigits: 0,
})

/** An amount in cents as US dollars, without cents where there are none. */
export function usd(amount_minor: number): string {
  return (amount_minor % 100 === 0 ? wholeDollars : dollars).format(amount_minor / 100)
}

/** Tanks that a bucket must hold to be shown, and the steps in which it is counted. @source API.md, `/insights/tanks` */
export const SMALLEST_BUCKET = 5

/**
 * A distribution as it may be shown: each count in whole steps of {@link SMALLEST_BUCKET}, buckets that hold fewer left
 * out, and a total of what is shown.
 *
 * What comes out is the same whether a bucket that is left out held 0 or 4: no total, no other distribution and no
 * second question about other days gives it away. An exact count beside a total would, and an exact count of two
 * overlapping spans would tell the one tank that lies between them.
 */
export function suppressed<Bucket extends { readonly tanks: number }>(
  buckets: readonly Bucket[],
): { tanks: number; buckets: Bucket[] } {
  const shown = buckets
    .map((bucket) => ({ ...bucket, tanks: bucket.tanks - (bucket.tanks % SMALLEST_BUCKET) }))
    .filter(({ tanks }) => tanks > 0)
  return { tanks: shown.reduce((sum, { tanks }) => sum + tanks, 0), buckets: shown }
}

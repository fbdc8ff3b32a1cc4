/** Lower ends of the buckets; the last one has no upper end. */
export const volumeEdges_l = [0, 30, 60, 100, 150, 200, 300, 450, 700, 1000] as const
export const khEdges_dkh = [0, 2, 4, 6, 8, 10, 12, 15, 20] as const

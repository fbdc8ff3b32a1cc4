/** Reports that the page shows; older ones are in the API. */
export const MOST_SHOWN = 500

/** Enquiries that the page shows; older ones are in the file and in the API. */
export const MOST_SHOWN = 500

/** Calls that are fetched at once; older ones are a button away. */
export const REQUESTS_A_PAGE = 200

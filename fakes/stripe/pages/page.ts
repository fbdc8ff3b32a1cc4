/** A visit to a hosted page: `/KIND/ID` or `/KIND/ID/PART`, by GET or with a posted form. */
export interface Page {
  method: string
  id: string
  part: string
  form: URLSearchParams
}

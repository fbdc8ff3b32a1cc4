/** A person who can sign in. */
export interface Person {
  readonly id: string
  readonly email: string
  readonly name: string
  readonly is_admin: boolean
}

/** What is known of whoever stands before the door: no account and no actor yet. */
export interface Visitor {
  readonly now: Date
  readonly ip?: string
  readonly user_agent?: string
  readonly request_id?: string
}

/** What a verb receives that acts before or without an account. */
export interface Visit<Input> {
  readonly visitor: Visitor
  readonly input: Input
}

/** The form in which an address is stored and compared. */
export function normaliseEmail(email: string): string {
  return email.trim().toLowerCase()
}

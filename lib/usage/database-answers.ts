import { statement } from "@/db"

/**
 * Resolves when the database answers.
 *
 * @throws DatabaseUnavailable when it does not: no metered call could succeed.
 */
export async function databaseAnswers(): Promise<void> {
  await statement("app", { name: "answers", text: "select 1", values: [] })
}

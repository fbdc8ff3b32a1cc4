/** Version of the formulas and constants: changes whenever an answer can change. */
export const ENGINE_VERSION = "2026.12.1"

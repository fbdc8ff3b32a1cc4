import fc from "fast-check"

// The same cases on every machine, so that a run that passed here passes there; `FC_SEED` looks at others.
fc.configureGlobal({ seed: Number(process.env.FC_SEED ?? 20261201) })

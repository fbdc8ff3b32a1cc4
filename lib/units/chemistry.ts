/** Chemical units of the trade in moles. Atomic weights: @source ciaaw2021. */

/** mol/L of alkalinity (charge) in one German degree: 10 mg/L CaO, M(CaO) 56.077, two charges. Exact by definition. */
export const ALKALINITY_MOL_L_PER_DKH = 20 / 56_077

/** mol/L of calcium and magnesium in one German degree of total hardness. Exact by definition. */
export const HARDNESS_MOL_L_PER_DGH = 10 / 56_077

/** mg of CO2 in a mole. */
export const CO2_MG_PER_MOL = 44_009.5

/** mg of phosphate (PO4) in a mole. */
export const PO4_MG_PER_MOL = 94_971

/** mg/L of CaCO3 (50.0435 mg per milliequivalent) in one German degree of carbonate hardness: 17.848. */
export const CACO3_MG_L_PER_DKH = ALKALINITY_MOL_L_PER_DKH * 50_043.5

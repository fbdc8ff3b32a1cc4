/** Stands at the foot of every sheet. */
export const disclaimer =
  "This sheet informs. It replaces neither the manual of the equipment, nor local codes, nor licensed practice. " +
  "Cylinders are filled, tested and repaired by licensed people only."

export { khEdges_dkh, volumeEdges_l } from "./edges"
export { recordTank, type TankEvent } from "./record-tank"
export { SMALLEST_BUCKET } from "./suppress"
export type { Tank } from "./tank"
export {
  type Distribution,
  type NamedBucket,
  type RangeBucket,
  type Span,
  type TankInsights,
  tankInsights,
} from "./tanks"

export { recordTank, type TankEvent } from "./record-tank"
export { SMALLEST_BUCKET } from "./suppress"
export type { Tank } from "./tank"
export {
  type Distribution,
  khEdges_dkh,
  type NamedBucket,
  type RangeBucket,
  type Span,
  type TankInsights,
  tankInsights,
  volumeEdges_l,
} from "./tanks"

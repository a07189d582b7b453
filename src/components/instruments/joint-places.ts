export type { FrameKind } from '#shared/press/model'
export { jointPlaces, measuringPlaces, type Spot as JointPlace } from '#shared/press/places'

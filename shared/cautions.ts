/** The cautions wherever force is decided (DOMAIN 6). */
export const CAUTIONS: readonly string[] = [
  'These figures are an aid, not a design approval. Local law and codes come first, and a licensed engineer where they ask for one.',
  'One static load says nothing of fatigue, cold, other bed holes, members without an indicator, or faces nobody examined. Dye penetrant finds surface cracks only.',
  'Nobody stands in line with pins, ram or tooling.',
  'No hand near a leak under pressure. Oil under the skin is an emergency.',
  'Never above the lowest rating in the train.',
  'Release first, look after.',
]

/** The same for where there is little room: on a press's tag. */
export const SHORT_CAUTIONS: readonly string[] = [
  'Never above the lowest rating in the train.',
  'Nobody in line with pins, ram or tooling, no hand near a leak.',
  'Says nothing of fatigue, cold, or faces nobody examined.',
  'An aid, not a design approval: local law and codes come first.',
]

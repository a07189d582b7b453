import { todayResponseSchema } from '#shared/api/today'
import type { TodayResponse } from '#shared/api/today'
import type { Today } from '../services/today'
import { presentPress } from './press-register'
import { presentProofTest } from './proof-test-register'

export function presentToday({ underWay, presses, ...rest }: Today): TodayResponse {
  return todayResponseSchema.parse({
    ...rest,
    underWay: underWay.map((one) => ({ ...one, test: presentProofTest(one.test) })),
    presses: presses.map((one) => ({ ...one, press: presentPress(one.press) })),
  })
}

import { useMutation } from '@tanstack/react-query'
import { instrumentResponseSchema } from '#shared/api/instruments'
import type { Calibration } from '#shared/instruments/model'
import { api } from '../../../lib/api-client'
import { instrumentPath, useKeepInstrument } from './get-instrument'

const addCalibration = (id: string, calibration: Calibration) =>
  api.send('POST', instrumentResponseSchema, `${instrumentPath(id)}/calibrations`, calibration)

export function useAddCalibration(instrumentId: string) {
  const keep = useKeepInstrument()
  return useMutation({ mutationFn: (calibration: Calibration) => addCalibration(instrumentId, calibration), onSuccess: keep })
}

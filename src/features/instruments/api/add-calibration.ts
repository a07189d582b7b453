import { useMutation } from '@tanstack/react-query'
import { instrumentResponseSchema } from '#shared/api/instruments'
import type { Calibration } from '#shared/instruments/model'
import type { Attachment } from '#shared/ledger/envelope'
import { api } from '../../../lib/api-client'
import { instrumentPath, useKeepInstrument } from './get-instrument'

export type CalibrationWithFile = Calibration & { certificateFile: Attachment | null }

const addCalibration = (id: string, calibration: CalibrationWithFile) =>
  api.send('POST', instrumentResponseSchema, `${instrumentPath(id)}/calibrations`, calibration)

export function useAddCalibration(instrumentId: string) {
  const keep = useKeepInstrument()
  return useMutation({ mutationFn: (calibration: CalibrationWithFile) => addCalibration(instrumentId, calibration), onSuccess: keep })
}

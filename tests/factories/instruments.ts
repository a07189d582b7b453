import { instrumentResponseSchema } from '#shared/api/instruments'
import type { InstrumentResponse } from '#shared/api/instruments'
import type { Calibration, GaugeDetails, IndicatorDetails, LoadCellDetails } from '#shared/instruments/model'
import type { SignedInPerson } from './people'

/** Invented instruments; the class of the gauge is one of EN 837-1. */
export const gauge = (given: Partial<GaugeDetails> = {}): GaugeDetails => ({
  kind: 'gauge',
  code: 'G-01',
  description: 'Glycerine gauge, 100 mm',
  style: 'dial',
  fullScale: { text: '10000', unit: 'psi' },
  increment: { text: '50', unit: 'psi' },
  accuracy: { standard: 'en-837-1', class: 1 },
  ...given,
})

export const indicator = (given: Partial<IndicatorDetails> = {}): IndicatorDetails => ({
  kind: 'indicator',
  code: 'I-01',
  description: 'Dial indicator',
  style: 'dial',
  range: { text: '10', unit: 'mm' },
  increment: { text: '0,01', unit: 'mm' },
  errorLimit: null,
  revolution: { text: '1', unit: 'mm' },
  ...given,
})

export const loadCell = (given: Partial<LoadCellDetails> = {}): LoadCellDetails => ({
  kind: 'load-cell',
  code: 'L-01',
  description: 'Hollow load cell',
  fullScale: { text: '200', unit: 'kN' },
  increment: { text: '0.1', unit: 'kN' },
  errorPercentOfSpan: 0.5,
  ...given,
})

export const calibration = (given: Partial<Calibration> = {}): Calibration => ({
  calibratedOn: '2025-03-09',
  dueOn: '2026-03-09',
  certificate: 'C-4471',
  comparedWith: 'Dead-weight tester D-2',
  result: 'in tolerance',
  uncertainty: null,
  ...given,
})

export async function enterInstrument(
  person: SignedInPerson,
  details: GaugeDetails | IndicatorDetails | LoadCellDetails,
  calibrations: readonly Calibration[] = [],
): Promise<InstrumentResponse> {
  let response = await person.client.post(`/api/instruments?shop=${person.shopId}`, details).expect(201)
  const { id } = instrumentResponseSchema.parse(response.body).instrument
  for (const one of calibrations) response = await person.client.post(`/api/instruments/${id}/calibrations`, one).expect(201)
  return instrumentResponseSchema.parse(response.body)
}

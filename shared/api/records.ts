import { z } from 'zod'

export const PAPER_SIZES = ['a4', 'letter'] as const

/** GET /api/proof-tests/:id/record.pdf: on which paper. */
export const recordPdfQuerySchema = z.object({ paper: z.enum(PAPER_SIZES, 'Choose a paper: a4 or letter.').default('a4') })

export type PaperSize = (typeof PAPER_SIZES)[number]

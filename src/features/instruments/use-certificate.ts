import { useQueryClient } from '@tanstack/react-query'
import { useEffect } from 'react'
import type { CalibrationRow } from '#shared/api/instruments'
import type { Attachment } from '#shared/ledger/envelope'
import type { Owner } from '../../lib/attachment-database'
import { useOwnFiles } from '../../lib/attachment-held'
import { files } from '../../lib/attachments'
import { instrumentQuery } from './api/get-instrument'

/**
 * The file chosen for a calibration that is not entered yet, kept on this device meanwhile. As soon as the server
 * has a calibration that names it, it belongs to that one and is sent, even if the page was left in between.
 */
export function useCertificate(
  instrumentId: string,
  calibrations: readonly CalibrationRow[],
  entering: boolean,
): { owner: Owner; chosen: readonly Attachment[] } {
  const client = useQueryClient()
  const owner: Owner = `draft:calibration-${instrumentId}`
  const waits = calibrations.some(({ certificateFile }) => certificateFile !== null && !certificateFile.present)
  const { files: own } = useOwnFiles(owner, entering || waits)
  useEffect(() => {
    if (entering) return
    for (const { id, certificateFile } of calibrations) {
      const kept = certificateFile && own.some(({ attachment }) => attachment.sha256 === certificateFile.sha256)
      if (kept) files.belongsTo(owner, `calibration:${id}`, [certificateFile.sha256]).catch(() => undefined)
    }
  }, [entering, calibrations, own, owner])
  useEffect(
    () =>
      files.onSent((sentOf) => {
        if (sentOf.startsWith('calibration:')) void client.invalidateQueries({ queryKey: instrumentQuery(instrumentId).queryKey })
      }),
    [client, instrumentId],
  )
  return { owner, chosen: own.map(({ attachment }) => attachment) }
}

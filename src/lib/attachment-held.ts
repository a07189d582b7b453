import { queryOptions, useQuery, useQueryClient } from '@tanstack/react-query'
import { useEffect, useState, useSyncExternalStore } from 'react'
import { heldAttachmentsSchema, type HeldAttachment } from '#shared/api/attachments'
import type { Attachment } from '#shared/ledger/envelope'
import { api } from './api-client'
import type { KeptFile, Owner } from './attachment-database'
import type { OwnFiles } from './attachment-files'
import { attachmentUrl, files, type Size } from './attachments'

export type Subject = 'proof-tests' | 'presses'

/** How often the server is asked while bytes are still to come from somewhere. */
const AGAIN_AFTER = 4_000

const heldKey = (ledgerId: string) => ['attachments', ledgerId] as const

/** Which photos and documents of a ledger the server has. */
export const heldQuery = (subject: Subject, ledgerId: string) =>
  queryOptions({
    queryKey: heldKey(ledgerId),
    queryFn: async ({ signal }): Promise<readonly HeldAttachment[]> =>
      (await api.get(heldAttachmentsSchema, `/api/${subject}/${encodeURIComponent(ledgerId)}/attachments`, { signal })).attachments,
    staleTime: 0,
    retry: false,
  })

const NONE: OwnFiles = { loaded: false, files: [] }

/** What of one owner lies on this device; nothing is looked up while nobody asks. */
export const useOwnFiles = (owner: Owner, asked = true): OwnFiles =>
  useSyncExternalStore(files.subscribe, () => (asked ? files.of(owner) : NONE))

/** Where the bytes of a photo or document are. */
export type Where =
  | { is: 'tablet'; refused: string | null }
  | { is: 'server' }
  | { is: 'lost'; why: string }
  /** Named by an entry, and neither here nor on the server. */
  | { is: 'elsewhere' }
  /** Not here, and the server can't be asked. */
  | { is: 'unknown' }

export function whereIs(attachment: Attachment, own: readonly KeptFile[], held: readonly HeldAttachment[] | undefined): Where {
  const kept = own.find((file) => file.attachment.sha256 === attachment.sha256)
  const named = held?.filter((one) => one.sha256 === attachment.sha256) ?? []
  if (named.some(({ present }) => present)) return { is: 'server' }
  if (kept) return { is: 'tablet', refused: kept.refused }
  const lost = named.find((one) => one.lost !== null)?.lost
  if (lost) return { is: 'lost', why: lost.why }
  return held === undefined ? { is: 'unknown' } : { is: 'elsewhere' }
}

export interface Files {
  where: (attachment: Attachment) => Where
  owner: Owner
}

/**
 * Where the photos and documents of a ledger are: on this device, on the server, lost, or still elsewhere.
 * `named` counts what its entries name: when it grows, or bytes go over, the server is asked again.
 */
export function useFiles(subject: Subject, ledgerId: string, named: number): Files {
  const owner: Owner = `ledger:${ledgerId}`
  const client = useQueryClient()
  const own = useOwnFiles(owner, named > 0)
  const { data } = useQuery({
    ...heldQuery(subject, ledgerId),
    enabled: named > 0 && ledgerId !== '',
    refetchInterval: ({ state }) => (state.data?.some(({ present, lost }) => !present && !lost) ? AGAIN_AFTER : false),
  })
  useEffect(() => {
    if (named > 0) void client.invalidateQueries({ queryKey: heldKey(ledgerId) })
  }, [client, ledgerId, named])
  useEffect(
    () =>
      files.onSent((sentOf, { sha256 }) => {
        if (sentOf !== `ledger:${ledgerId}`) return
        client.setQueryData<readonly HeldAttachment[]>(heldKey(ledgerId), (held) =>
          held?.map((one) => (one.sha256 === sha256 ? { ...one, present: true } : one)),
        )
        void client.invalidateQueries({ queryKey: heldKey(ledgerId) })
      }),
    [client, ledgerId],
  )
  return { owner, where: (attachment) => whereIs(attachment, own.files, data) }
}

/** The address of a picture: of the bytes on this device while they are here, else of the server's. Null until it is known. */
export function useAttachmentUrl(owner: Owner, attachment: Attachment, size?: Size): string | null {
  const { loaded, files: own } = useOwnFiles(owner)
  const here = own.some((file) => file.attachment.sha256 === attachment.sha256)
  const [local, setLocal] = useState<{ sha256: string; url: string } | null>(null)
  useEffect(() => {
    if (!here) return undefined
    let url: string | null = null
    let left = false
    files
      .blob(owner, attachment)
      .then((blob) => {
        if (!blob || left) return
        url = URL.createObjectURL(blob)
        setLocal({ sha256: attachment.sha256, url })
      })
      .catch(() => undefined)
    return () => {
      left = true
      if (url !== null) URL.revokeObjectURL(url)
      setLocal(null)
    }
    // What it is follows from its hash.
    // eslint-disable-next-line react-hooks/exhaustive-deps
  }, [here, owner, attachment.sha256])
  if (here) return local?.sha256 === attachment.sha256 ? local.url : null
  return loaded ? attachmentUrl(owner, attachment.sha256, size) : null
}

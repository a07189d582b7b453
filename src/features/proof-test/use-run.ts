import { useCallback, useEffect, useMemo, useRef, useState, useSyncExternalStore } from 'react'
import { useQuery, useQueryClient } from '@tanstack/react-query'
import { v7 as newId } from 'uuid'
import type { Attachment, EntryDraft, LedgerEntry, Override } from '#shared/ledger/envelope'
import type { Decision, Finding } from '#shared/ledger/rules'
import { decideProofTest } from '#shared/proof-test/decide'
import { ALWAYS_ALLOWED, PROOF_TEST_ACTS, type Mark, type ProofTestKind, type ProofTestPayload } from '#shared/proof-test/entries'
import { evaluateClimb, type ClimbEvaluation } from '#shared/proof-test/evaluate-climb'
import type { ProofTestState } from '#shared/proof-test/state'
import { nextStep, type Step } from '#shared/proof-test/steps'
import { useFiles, type Files } from '../../lib/attachment-held'
import { placedIn, type Placed } from '../../lib/attachment-places'
import { bootId, deviceId, monotonicMs } from '../../lib/entry'
import { useUser } from '../../lib/here'
import type { KnownLedger } from '../../lib/known-ledger'
import { outbox, type LedgerOutbox } from '../../lib/outbox'
import type { Refused } from '../../lib/outbox-database'
import { Disconnected, isSignedOut } from '../../lib/problem'
import { askToKeepOnce } from '../../lib/storage-persistence'
import { useLive } from '../../lib/use-live'
import { addKept, entriesKey, entriesQuery } from './api/get-entries'
import { irregularUnderLoad, LedgerFold } from './ledger-view'

export type Part = 'lead' | 'pump hand' | 'witness'

/** What a press of a button would write, and the photos that go with it. */
export type Draft = { [K in ProofTestKind]: { kind: K; payload: ProofTestPayload<K>; attachments?: Attachment[] } }[ProofTestKind]

/** Something that may be written only with a reason: the rules that ask, and what was to be written. */
export interface Asking {
  draft: Draft
  findings: readonly Finding[]
}

export interface Connection {
  connected: boolean
  signedOut: boolean
  /** When the server was last heard. */
  lastHeard: Date | null
}

export interface Run {
  testId: string
  me: { id: string; name: string; part: Part | null }
  state: ProofTestState
  step: Step
  entries: readonly LedgerEntry[]
  people: Readonly<Record<string, string>>
  /** Photos and documents that entries name, and where their bytes are. */
  photos: readonly Placed[]
  files: Files
  /** The climb that is under way, or was last. */
  evaluation: ClimbEvaluation | null
  /** Rules of interlocks that were gone against under this load; then only stop and release are offered. */
  irregular: readonly string[]
  connection: Connection
  counts: { tablet: number; server: number; sealed: boolean }
  /** How far an entry has come, by its id. */
  placeOf: (entryId: string) => EntryPlaceName
  box: LedgerOutbox
  asking: Asking | null
  refused: readonly Finding[]
  attention: readonly Refused[]
  decide: (draft: Draft, overrides?: readonly Override[]) => Decision
  record: (draft: Draft, overrides?: readonly Override[]) => void
  /** Writes what was asked about, with this reason for each rule. */
  giveReason: (reason: string) => void
  leave: () => void
}

export const markNow = (): Mark => ({ at: new Date().toISOString(), bootId, monotonicMs: monotonicMs() })

const NOBODY: KnownLedger = { ledgerId: '', entries: [], people: {}, sealedSeq: 0 }

function partOf(state: ProofTestState, id: string): Part | null {
  const people = state.opened?.people
  if (people?.lead.id === id) return 'lead'
  if (people?.witness.id === id) return 'witness'
  return people?.pumpHand.id === id ? 'pump hand' : null
}

function useBox(ledgerId: string): LedgerOutbox {
  return useSyncExternalStore(outbox.subscribe, () => outbox.ledger(ledgerId))
}

/** How long a test that was kept on this device waits for the server's first word before it counts as unconnected (ms). */
const FIRST_WORD = 1500

function useUnheard(known: KnownLedger): boolean {
  const [late, setLate] = useState(false)
  const waiting = known.fromDevice === true
  useEffect(() => {
    if (!waiting) return undefined
    const timer = setTimeout(() => setLate(true), FIRST_WORD)
    return () => clearTimeout(timer)
  }, [waiting])
  return waiting && late
}

/** A fact that the server refused has happened all the same: it counts here, in its place, until the server takes it. */
function madeHere({ pending, attention }: LedgerOutbox): readonly EntryDraft[] {
  const facts = attention.flatMap(({ entry }) => (PROOF_TEST_ACTS.has(entry.kind) ? [] : [entry]))
  if (facts.length === 0) return pending
  return [...facts, ...pending].sort((a, b) => (a.deviceId === b.deviceId ? a.deviceSeq - b.deviceSeq : 0))
}

/** The test's ledger as this device sees it: the server's entries, and behind them its own that wait. */
function useLedger(testId: string) {
  const client = useQueryClient()
  const query = useQuery(entriesQuery(testId, client))
  useLive([testId], entriesKey(testId))
  const user = useUser()
  useEffect(() => outbox.onKept((id, kept) => addKept(client, id, kept)), [client])
  useEffect(() => outbox.sendAs(user.id), [user.id])
  const known = query.data ?? NOBODY
  const box = useBox(known.ledgerId === '' ? testId : known.ledgerId)
  const fold = useMemo(() => new LedgerFold(testId), [testId])
  const folded = useMemo(() => fold.fold(known.entries, madeHere(box)), [fold, known.entries, box])
  const unheard = useUnheard(known)
  return { query, known, box, folded, user, unheard }
}

interface Writing {
  ledgerId: string
  testId: string
  authorId: string
  folded: { state: ProofTestState; server: ProofTestState }
  blocked: boolean
}

/** Writing to the ledger: the rules first, then the disk, then the screen. A second tap writes nothing. */
function useWriting({ ledgerId, testId, authorId, folded, blocked }: Writing) {
  const [asking, setAsking] = useState<Asking | null>(null)
  const [refused, setRefused] = useState<readonly Finding[]>([])
  const busy = useRef(new Set<string>())
  const { state, server } = folded
  useEffect(() => busy.current.clear(), [state])
  const decide = useCallback(
    (draft: Draft, overrides: readonly Override[] = []): Decision =>
      decideProofTest(state, { ...draft, payload: { ...draft.payload }, overrides, authorId, mark: markNow() }),
    [state, authorId],
  )
  const record = useCallback(
    (draft: Draft, overrides: readonly Override[] = []): void => {
      // R1: a device that can't keep entries still stops and releases.
      if (busy.current.has(draft.kind) || (blocked && !ALWAYS_ALLOWED.has(draft.kind))) return
      const decision = decide(draft, overrides)
      setRefused(decision.outcome === 'refused' ? decision.findings : [])
      setAsking(decision.outcome === 'needs-reason' ? { draft, findings: decision.findings } : null)
      if (decision.outcome !== 'allowed') return
      busy.current.add(draft.kind)
      // A person has just tapped: browsers answer this better then.
      void askToKeepOnce()
      const entry = {
        id: newId(),
        ledgerId,
        ...draft,
        authorId,
        basedOnSeq: server.headSeq,
        overrides: [...overrides],
        observedAt: new Date().toISOString(),
      }
      outbox.enqueue(testId, entry, server.devices[deviceId()]?.highest ?? 0).catch(() => busy.current.delete(draft.kind))
    },
    [decide, blocked, ledgerId, testId, authorId, server],
  )
  const giveReason = useCallback(
    (reason: string) => {
      if (asking)
        record(
          asking.draft,
          asking.findings.map(({ rule }) => ({ rule, reason })),
        )
    },
    [asking, record],
  )
  const leave = useCallback(() => {
    setAsking(null)
    setRefused([])
  }, [])
  return { decide, record, asking, refused, giveReason, leave }
}

export type EntryPlaceName = 'tablet' | 'server' | 'sealed'

function placesOf({ entries, sealedSeq }: KnownLedger): (entryId: string) => EntryPlaceName {
  const seqs = new Map(entries.map((entry) => [entry.id, entry.seq]))
  return (entryId) => {
    const seq = seqs.get(entryId)
    if (seq === undefined) return 'tablet'
    return seq <= sealedSeq ? 'sealed' : 'server'
  }
}

export type RunLoad = { is: 'ready'; run: Run } | { is: 'loading' } | { is: 'failed'; error: unknown }

/** Everything that the screens of a test under way need: where it is, what comes next, and the way to write. */
export function useRun(testId: string): RunLoad {
  const { query, known, box, folded, user, unheard } = useLedger(testId)
  const { state, entries } = folded
  const ledgerId = known.ledgerId
  const writing = useWriting({ ledgerId, testId, authorId: user.id, folded, blocked: box.fault !== null })
  const step = useMemo(() => nextStep(state), [state])
  const evaluation = useMemo(() => (state.position ? evaluateClimb(state, state.position.leg, state.position.climb) : null), [state])
  const irregular = useMemo(() => irregularUnderLoad(state, entries), [state, entries])
  const placeOf = useMemo(() => placesOf(known), [known])
  const photos = useMemo(() => placedIn(entries), [entries])
  const files = useFiles('proof-tests', testId, photos.length)
  if (!query.data || !box.loaded) {
    if (query.data === undefined && query.error) return { is: 'failed', error: query.error }
    if (box.fault === null || query.data === undefined) return { is: 'loading' }
  }
  const lost = query.error instanceof Disconnected || (query.error instanceof Error && query.error.name === 'TimeoutError')
  const run: Run = {
    ...writing,
    testId,
    me: { id: user.id, name: user.name, part: partOf(state, user.id) },
    state,
    step,
    entries,
    people: known.people,
    photos,
    files,
    evaluation,
    irregular,
    connection: {
      connected: !lost && !unheard && query.data !== undefined,
      signedOut: isSignedOut(query.error) || box.sender.is === 'signed-out',
      lastHeard: query.dataUpdatedAt > 0 ? new Date(query.dataUpdatedAt) : null,
    },
    counts: { tablet: folded.pending, server: known.entries.length, sealed: state.headSeq > 0 && known.sealedSeq >= state.headSeq },
    placeOf,
    box,
    attention: box.attention,
  }
  return { is: 'ready', run }
}

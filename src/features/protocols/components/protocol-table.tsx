import type { ReactNode } from 'react'
import type { ProtocolRow } from '#shared/api/protocols'
import { secondsWords } from '#shared/proof-test/protocol-words'
import { TextLink } from '../../../components/button'
import { DataTable, type Column } from '../../../components/data-table'
import { paths } from '../../../paths'
import { StageTicks } from './stage-strip'

const stageWords = ({ content }: ProtocolRow) => {
  const stages = `${content.stages.map((stage) => stage.percent).join(', ')}\u202f%`
  return content.aboveRating ? `${stages}, then above` : stages
}
const legWords = ({ content }: ProtocolRow) => content.legs.map((leg) => leg.label.toLowerCase()).join(', then ')
const fullHold = ({ content }: ProtocolRow) => secondsWords(content.stages.at(-1)?.holdSeconds ?? 0)

const columns: readonly Column<ProtocolRow>[] = [
  {
    id: 'name',
    header: 'Protocol',
    names: true,
    className: 'desktop:whitespace-nowrap',
    cell: (row) => <TextLink to={paths.protocol.href(row.id)}>{row.name}</TextLink>,
  },
  {
    id: 'stages',
    header: 'Stages, of rated load',
    className: 'whitespace-nowrap',
    cell: (row) => (
      <span className="flex items-center gap-3">
        <StageTicks stages={row.content.stages} />
        {stageWords(row)}
      </span>
    ),
  },
  { id: 'hold', header: 'Full load held', align: 'right', className: 'whitespace-nowrap', cell: fullHold },
  { id: 'legs', header: 'Legs', className: 'w-full pl-3', from: 'desktop', cell: legWords },
  { id: 'version', header: 'Version', align: 'right', cell: (row) => row.version },
]

/** The protocols of a shop: their stages to scale, and what they ask for. */
export function ProtocolTable({ caption, protocols, nothing }: { caption: string; protocols: readonly ProtocolRow[]; nothing: ReactNode }) {
  return (
    <DataTable
      caption={caption}
      rows={protocols}
      rowKey={(row) => row.id}
      columns={columns}
      nothing={nothing}
      phoneRow={(row) => ({
        title: row.name,
        note: stageWords(row),
        aside: row.content.legs.length === 1 ? '1 leg' : `${row.content.legs.length} legs`,
        asideNote: `version ${row.version}`,
        to: paths.protocol.href(row.id),
      })}
    />
  )
}

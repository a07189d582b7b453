import type { ProtocolValue } from './protocol-values'

/** Values of a protocol between hairlines, each with where it comes from. */
export function ValueList({ values }: { values: readonly ProtocolValue[] }) {
  return (
    <dl className="border-t border-hairline">
      {values.map(([name, value, source]) => (
        <div key={name} className="grid grid-cols-[1fr_auto] items-baseline gap-x-4 border-b border-hairline py-2">
          <dt>{name}</dt>
          <dd className="text-right font-semibold">{value}</dd>
          <dd className="col-span-2 text-graphite">{source}</dd>
        </div>
      ))}
    </dl>
  )
}

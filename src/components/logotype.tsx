import { ProductMark } from './product-mark'

/** The mark with the name beside it. */
export function Logotype({ tone }: { tone: 'dye' | 'steel' }) {
  return (
    <span className="flex items-center gap-2.5">
      <ProductMark size={40} tone={tone} />
      <span className="text-26 font-semibold">Quarterload</span>
    </span>
  )
}

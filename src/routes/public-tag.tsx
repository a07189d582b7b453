import { useParams } from 'react-router-dom'
import { ProductMark } from '../components/product-mark'
import { ScaleEdge } from '../components/plate'
import { PublicTagPage } from '../features/tag/components/public-tag-page'

export function Component() {
  const { code = '' } = useParams()
  return (
    <PublicTagPage
      key={code}
      code={code}
      head={(shopName) => (
        <header className="ground-deep-dye print:bg-[#fff]! print:text-[#000]!">
          <div className="mx-auto flex min-h-14 w-full max-w-[880px] items-center gap-3 px-4 tablet:px-6">
            <span className="print:hidden">
              <ProductMark size={34} />
            </span>
            <p className="min-w-0 font-semibold">{shopName ?? 'The tag of a press'}</p>
          </div>
          <div className="print:hidden">
            <ScaleEdge />
          </div>
        </header>
      )}
    />
  )
}

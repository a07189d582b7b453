import type { ReactNode } from 'react'
import { Logotype } from '../../../components/logotype'
import { ZonedSheet } from '../../../components/zoned-sheet'
import { classNames } from '../../../lib/class-names'
import { PressDrawing, QuartersDrawing } from './press-drawing'

type TitleBlockProps = {
  /** The large words at the head of the sheet. */
  title: ReactNode
  lead: ReactNode
  /** What the block at the corner of the sheet holds. */
  children: ReactNode
  foot: ReactNode
  /** Longer forms take more of the sheet; the drawing of the quarters gives way. */
  wide?: boolean
  /** What is said over the sheet. */
  over?: ReactNode
}

/** The drawing sheet that greets who isn't signed in: the press, its quarters, and a form for a title block. */
export function TitleBlock({ title, lead, children, foot, wide = false, over }: TitleBlockProps) {
  return (
    <main className="ground-dye flex min-h-dvh flex-col desktop:p-5">
      {over}
      <ZonedSheet columns={8} rows={4} className="grow">
        <div
          className={classNames(
            'grid grow grid-rows-[auto_1fr] tablet:grid-cols-[1fr_auto]',
            wide ? 'desktop:grid-cols-[minmax(0,1fr)_auto_600px]' : 'desktop:grid-cols-[minmax(0,1fr)_auto_402px]',
          )}
        >
          <div className="hidden items-center justify-center py-4 pr-6 tablet:flex desktop:col-start-1 desktop:row-span-2 desktop:row-start-1 desktop:p-4">
            <PressDrawing
              className={classNames('h-72 max-w-full desktop:h-[min(680px,calc(100dvh-134px))]', wide && 'tablet:max-desktop:h-40')}
            />
          </div>
          <div className="hidden items-center pr-6 desktop:col-start-2 desktop:row-span-2 desktop:row-start-1 desktop:flex">
            {!wide && <QuartersDrawing className="h-[min(590px,calc(100dvh-210px))]" />}
          </div>
          <div
            className={classNames(
              'self-end px-4 pt-6 pb-5 tablet:col-start-1 tablet:row-start-1 tablet:self-center tablet:px-6 desktop:col-start-3 desktop:self-start desktop:px-4',
              wide ? 'desktop:px-6' : 'desktop:pt-7',
            )}
          >
            <h1 className={classNames('text-34', wide ? 'tablet:text-34' : 'tablet:text-54/[56px]')}>{title}</h1>
            <div className={classNames('text-faint-scribe tablet:text-18', wide ? 'mt-1' : 'mt-2 tablet:mt-4')}>{lead}</div>
          </div>
          <div className="ground-steel flex flex-col tablet:col-span-2 desktop:col-span-1 desktop:col-start-3 desktop:row-start-2 desktop:self-end">
            <div className="border-b border-rule px-4 py-2.5 tablet:px-6 desktop:py-3.5">
              <Logotype tone="steel" />
            </div>
            <div className="grow px-4 py-5 tablet:px-6 desktop:py-4">{children}</div>
            <div className="grid auto-cols-fr grid-flow-col divide-x divide-rule border-t border-rule">{foot}</div>
          </div>
        </div>
      </ZonedSheet>
    </main>
  )
}

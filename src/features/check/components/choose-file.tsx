import { useId, useState, type DragEvent } from 'react'
import { classNames } from '../../../lib/class-names'

interface ChooseFileProps {
  /** The file that is shown now. */
  chosen: string | null
  onChoose: (file: File) => void
}

/** Where a ledger file is chosen or dropped: the whole field is the button. */
export function ChooseFile({ chosen, onChoose }: ChooseFileProps) {
  const id = useId()
  const [isOver, setIsOver] = useState(false)
  const drop = (event: DragEvent) => {
    event.preventDefault()
    setIsOver(false)
    const [file] = event.dataTransfer.files
    if (file) onChoose(file)
  }
  return (
    <label
      htmlFor={id}
      onDragOver={(event) => {
        event.preventDefault()
        setIsOver(true)
      }}
      onDragLeave={() => setIsOver(false)}
      onDrop={drop}
      className={classNames(
        'flex min-h-28 cursor-pointer flex-col items-center justify-center rounded-key border-2 px-5 py-4 text-center focus-within:outline-3 focus-within:outline-offset-2 focus-within:outline-focus',
        chosen === null ? 'border-on-chalk bg-chalk text-on-chalk' : 'border-rule bg-sheet text-ink hover:border-ink',
        isOver && 'border-dashed',
      )}
    >
      <span className="text-20 font-semibold">{chosen === null ? 'Choose a ledger file' : 'Choose another file'}</span>
      <span className="text-16">{isOver ? 'Let go to check it' : 'or drop it here'}</span>
      <input
        id={id}
        type="file"
        accept=".json,application/json"
        className="sr-only"
        onChange={(event) => {
          const [file] = event.target.files ?? []
          if (file) onChoose(file)
          // The same file, changed meanwhile, can be chosen again.
          event.target.value = ''
        }}
      />
    </label>
  )
}

import { createContext, useContext, useMemo, useState, type ReactNode } from 'react'

/** Which joint of the form is being put on the drawing beside it. */
interface FormPlacing {
  jointId: string | null
  begin: (jointId: string) => void
  end: () => void
}

const FormPlacingContext = createContext<FormPlacing>({ jointId: null, begin: () => undefined, end: () => undefined })

export const useFormPlacing = (): FormPlacing => useContext(FormPlacingContext)

export function FormPlacingProvider({ children }: { children: ReactNode }) {
  const [jointId, setJointId] = useState<string | null>(null)
  const placing = useMemo(() => ({ jointId, begin: setJointId, end: () => setJointId(null) }), [jointId])
  return <FormPlacingContext value={placing}>{children}</FormPlacingContext>
}

import { get, useController, useFormState, type Control, type FieldPath, type FieldValues } from 'react-hook-form'
import type { ComponentProps } from 'react'
import type { Unit } from '#shared/units'
import { DecimalField, QuantityField } from './decimal-field'
import { RadioRow } from './radio-row'
import { SelectField } from './select-field'

/** Fields that a form holds by name: what `Controller` would write each time. */
type Held<V extends FieldValues, C, T> = { control: Control<V, C, T>; name: FieldPath<V> }
type Given = 'value' | 'onChange' | 'onBlur' | 'name' | 'ref' | 'message'

/** The message of a field, or of the first part of it (`.text`, `.unit`) that has one. */
function useMessage<V extends FieldValues, C, T>({ control, name }: Held<V, C, T>): string | undefined {
  const { errors } = useFormState({ control, name })
  const messageAt = (path: string): string | undefined => {
    const found: unknown = get(errors, path)
    if (typeof found !== 'object' || found === null || !('message' in found)) return undefined
    return typeof found.message === 'string' && found.message !== '' ? found.message : undefined
  }
  return messageAt(`${name}.text`) ?? messageAt(`${name}.unit`) ?? messageAt(name)
}

export function ControlledDecimal<V extends FieldValues, C, T>({
  control,
  name,
  ...rest
}: Held<V, C, T> & Omit<ComponentProps<typeof DecimalField>, Given>) {
  const { field } = useController({ control, name })
  const message = useMessage({ control, name })
  return <DecimalField {...rest} {...field} value={field.value ?? ''} message={message} />
}

export function ControlledQuantity<V extends FieldValues, C, T, U extends Unit>({
  control,
  name,
  ...rest
}: Held<V, C, T> & Omit<ComponentProps<typeof QuantityField<U>>, Given>) {
  const { field } = useController({ control, name })
  const message = useMessage({ control, name })
  return <QuantityField<U> {...rest} {...field} value={field.value ?? { text: '', unit: '' }} message={message} />
}

export function ControlledRadios<V extends FieldValues, C, T>({
  control,
  name,
  ...rest
}: Held<V, C, T> & Omit<ComponentProps<typeof RadioRow>, Given>) {
  const { field } = useController({ control, name })
  const message = useMessage({ control, name })
  return <RadioRow {...rest} {...field} value={field.value ?? ''} message={message} />
}

export function ControlledSelect<V extends FieldValues, C, T>({
  control,
  name,
  ...rest
}: Held<V, C, T> & Omit<ComponentProps<typeof SelectField>, Given>) {
  const { field } = useController({ control, name })
  const message = useMessage({ control, name })
  return <SelectField {...rest} {...field} value={field.value ?? ''} message={message} />
}

import { get } from 'react-hook-form'

/** One piece of what is typed about strength: its value, who hears of a change, and where it stands in the form. */
export interface Part<V> {
  value: V
  onChange: (value: V) => void
  /** Its name in the form, under which messages come back. */
  at: string
  errors: unknown
  units: { length: 'mm' | 'in' | 'm' }
}

function said(errors: unknown, path: string): string | undefined {
  const found: unknown = get(errors, path)
  if (typeof found !== 'object' || found === null || !('message' in found)) return undefined
  return typeof found.message === 'string' && found.message !== '' ? found.message : undefined
}

/** What is wrong with a field or with the first part of it that a message is about. */
export function messageOf<V>({ errors, at }: Part<V>, key: string): string | undefined {
  const path = `${at}.${key}`
  return said(errors, `${path}.text`) ?? said(errors, `${path}.unit`) ?? said(errors, `${path}.root`) ?? said(errors, path)
}

/** What a field of a part takes: its name, value, change and message. */
export function held<V extends object, K extends keyof V & string>(part: Part<V>, key: K) {
  return {
    name: `${part.at}.${key}`,
    value: part.value[key],
    onChange: (value: V[K]) => part.onChange({ ...part.value, [key]: value }),
    message: messageOf(part, key),
  }
}

/** A part within a part. */
export function within<V extends object, K extends keyof V & string>(part: Part<V>, key: K): Part<V[K]> {
  const { value, onChange } = held(part, key)
  return { ...part, at: `${part.at}.${key}`, value, onChange }
}

/** A choice among words, as native lists and radios report it; a message asks for the choice in its own words. */
export function chosen<V extends object, K extends keyof V & string>(part: Part<V>, key: K, values: readonly V[K][], ask = '') {
  const { name, value, onChange, message } = held(part, key)
  return {
    name,
    value: String(value),
    message: message === undefined ? undefined : ask || message,
    onChange: (event: { target: { value: string } }) => {
      const one = values.find((candidate) => String(candidate) === event.target.value)
      if (one !== undefined) onChange(one)
    },
  }
}

/** Plain text of a part. */
export function text<V extends object, K extends { [P in keyof V]: V[P] extends string ? P : never }[keyof V] & string>(
  part: Part<V>,
  key: K,
) {
  return {
    name: `${part.at}.${key}`,
    value: String(part.value[key]),
    message: messageOf(part, key),
    onChange: (event: { target: { value: string } }) => part.onChange({ ...part.value, [key]: event.target.value }),
  }
}

import { useState } from 'react'
import { RadioRow } from '../../../components/radio-row'
import { applyTheme, readTheme, themes, type Theme } from '../../../lib/theme'

const words: Record<Theme, string> = { device: 'As this device', light: 'Light', dark: 'Dark' }

/** Light or dark screens on this device, at once. */
export function ThemeChoice() {
  const [theme, setTheme] = useState(readTheme)
  return (
    <RadioRow
      label="Screens on this device"
      name="theme"
      className="max-w-xl"
      value={theme}
      choices={themes.map((one) => ({ value: one, label: words[one] }))}
      onChange={(event) => {
        const chosen = themes.find((one) => one === event.target.value) ?? 'device'
        applyTheme(chosen)
        setTheme(chosen)
      }}
    />
  )
}

/** Light or dark by the person's own word; otherwise the device decides. */
export const themes = ['device', 'light', 'dark'] as const
export type Theme = (typeof themes)[number]

const KEY = 'quarterload.theme'

export function readTheme(): Theme {
  try {
    const kept = localStorage.getItem(KEY)
    return themes.find((theme) => theme === kept) ?? 'device'
  } catch {
    return 'device'
  }
}

/** Shows a theme now and, where the device keeps anything, from now on. */
export function applyTheme(theme: Theme): void {
  if (theme === 'device') delete document.documentElement.dataset['theme']
  else document.documentElement.dataset['theme'] = theme
  try {
    localStorage.setItem(KEY, theme)
  } catch {
    return
  }
}

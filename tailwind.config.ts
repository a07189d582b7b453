import type { Config } from 'tailwindcss'

/** One step of type: size with the line height that goes with it, in px at the root size of 16. */
function step(size: number, line: number): [string, { lineHeight: string }] {
  return [`${size / 16}rem`, { lineHeight: `${line / 16}rem` }]
}

/**
 * The whole palette and scale of the product. Colours are custom properties (see src/index.css) so that
 * dark mode changes them in one place; nothing outside this list exists as a class.
 */
const config: Config = {
  content: ['./index.html', './src/**/*.{ts,tsx}'],
  theme: {
    colors: {
      transparent: 'transparent',
      current: 'currentColor',
      dye: 'var(--dye)',
      'deep-dye': 'var(--deep-dye)',
      'thin-dye': 'var(--thin-dye)',
      scribe: 'var(--scribe)',
      'faint-scribe': 'var(--faint-scribe)',
      ghost: 'var(--ghost)',
      chalk: 'var(--chalk)',
      'on-chalk': 'var(--on-chalk)',
      steel: 'var(--steel)',
      sheet: 'var(--sheet)',
      field: 'var(--field)',
      ink: 'var(--ink)',
      graphite: 'var(--graphite)',
      hairline: 'var(--hairline)',
      rule: 'var(--rule)',
      stop: 'var(--stop)',
      'on-stop': 'var(--on-stop)',
      'stop-line': 'var(--stop-line)',
      'stop-text': 'var(--stop-text)',
      'stop-ink': 'var(--stop-ink)',
      sound: 'var(--sound)',
      'sound-line': 'var(--sound-line)',
      'sound-fill': 'var(--sound-fill)',
    },
    fontFamily: {
      sans: ['"IBM Plex Sans"', 'system-ui', 'sans-serif'],
      condensed: ['"IBM Plex Sans Condensed"', '"IBM Plex Sans"', 'system-ui', 'sans-serif'],
      mono: ['"IBM Plex Mono"', 'ui-monospace', 'monospace'],
    },
    fontSize: {
      14: step(14, 20),
      16: step(16, 24),
      18: step(18, 26),
      20: step(20, 28),
      22: step(22, 30),
      26: step(26, 34),
      34: step(34, 42),
      46: step(46, 52),
      54: step(54, 58),
      76: step(76, 76),
      104: step(104, 96),
    },
    fontWeight: { normal: '400', medium: '500', semibold: '600', bold: '700' },
    borderRadius: { none: '0', field: '2px', key: '3px', full: '9999px' },
    boxShadow: { none: 'none' },
    screens: { tablet: '720px', desktop: '1024px', wide: '1280px' },
  },
}

export default config

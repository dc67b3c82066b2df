import type { Config } from 'tailwindcss'

/** Colours are variables, so that a theme changes in one place: `app/globals.css`. */
const colours = [
  'chalk',
  'board',
  'steel',
  'ink',
  'ink-soft',
  'line',
  'edge',
  'heart',
  'on-heart',
  'wash',
  'dry',
  'mid',
  'damp',
  'warn',
  'good',
]

const config: Config = {
  content: ['./app/**/*.{ts,tsx}'],
  theme: {
    colors: {
      transparent: 'transparent',
      current: 'currentColor',
      ...Object.fromEntries(colours.map((name) => [name, `var(--${name})`])),
    },
    fontFamily: { sans: ['"Source Sans 3"', 'system-ui', 'sans-serif'] },
    fontSize: {
      small: ['13px', '18px'],
      label: ['14px', '20px'],
      body: ['16px', '24px'],
      title: ['19px', '26px'],
      verdict: ['20px', '26px'],
      sentence: ['28px', '35px'],
      'sentence-phone': ['24px', '31px'],
      display: ['44px', '52px'],
    },
    fontWeight: { normal: '400', semibold: '600' },
    borderRadius: { none: '0', DEFAULT: '2px', full: '9999px' },
    boxShadow: { menu: '0 4px 16px rgb(0 0 0 / 0.18)' },
    extend: {
      maxWidth: { column: '1120px', words: '68ch' },
      transitionDuration: { DEFAULT: '150ms' },
    },
  },
}

export default config

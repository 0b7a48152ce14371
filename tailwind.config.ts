import type { Config } from 'tailwindcss'

/** The design tokens of the drawing sheet. Colours are CSS variables so that light, dark and print share one set of names. */
const colour = (name: string) => `var(--${name})`

export default {
  content: ['./index.html', './src/**/*.{ts,tsx}'],
  darkMode: ['selector', '[data-theme="dark"]'],
  theme: {
    colors: {
      transparent: 'transparent',
      current: 'currentColor',
      ground: colour('ground'),
      sheet: colour('sheet'),
      ink: colour('ink'),
      soft: colour('soft'),
      line: colour('line'),
      strong: colour('line-strong'),
      own: { DEFAULT: colour('own'), wash: colour('own-wash') },
      within: { DEFAULT: colour('within'), wash: colour('within-wash') },
      near: { DEFAULT: colour('near'), wash: colour('near-wash') },
      left: colour('left'),
      stop: { DEFAULT: colour('stop'), ink: colour('stop-ink') },
      hub: colour('hub'),
    },
    fontFamily: { sans: ['"Manrope Variable"', 'system-ui', 'sans-serif'] },
    borderRadius: { none: '0', full: '9999px' },
    extend: {
      maxWidth: { sheet: '77.5rem' },
      screens: { xs: '26rem' },
    },
  },
} satisfies Config

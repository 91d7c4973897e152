import type { Config } from 'tailwindcss'

/**
 * Design tokens. A colour's value per theme stands in `src/theme/tokens.css` as a custom property; the names
 * here are what classes use: `bg-sheet`, `text-muted`, `border-rule`.
 */
const token = (name: string) => `var(--${name})`

export default {
  content: ['./index.html', './src/**/*.{ts,tsx}'],
  darkMode: ['selector', '[data-theme="tank"]'],
  theme: {
    extend: {
      colors: {
        sheet: token('sheet'),
        panel: token('panel'),
        face: token('face'),
        ink: token('ink'),
        muted: token('muted'),
        rule: token('rule'),
        select: token('select'),
        'on-select': token('on-select'),
        breach: token('breach'),
        'on-breach': token('on-breach'),
        good: token('good'),
      },
      fontFamily: { mono: ['"JetBrains Mono"', 'ui-monospace', 'monospace'] },
      fontSize: {
        label: ['0.6875rem', { lineHeight: '1rem', letterSpacing: '0.06em' }],
        small: ['0.75rem', { lineHeight: '1.125rem' }],
        base: ['0.8125rem', { lineHeight: '1.25rem' }],
        large: ['1rem', { lineHeight: '1.5rem' }],
        figure: ['1.25rem', { lineHeight: '1.5rem' }],
      },
      spacing: { glove: '3.5rem', act: '5rem' },
      borderRadius: { none: '0' },
    },
  },
} satisfies Config

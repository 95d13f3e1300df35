import type { Config } from 'tailwindcss'

/** Sizes in rem, so that a larger text setting of the reader carries through. */
const px = (value: number) => `${value / 16}rem`

/** Paper, ink and one colour: no other palette exists, so that no fourth colour can slip in. */
const token = (name: string) => `var(--${name})`

export default {
  content: [
    './app/**/*.{vue,ts}',
  ],
  theme: {
    colors: {
      'transparent': 'transparent',
      'current': 'currentColor',
      'paper': token('paper'),
      'sheet': token('sheet'),
      'ink': token('ink'),
      'ink2': token('ink2'),
      'ink3': token('ink3'),
      'oxide': token('oxide'),
      'on-oxide': token('on-oxide'),
      'galv': token('galv'),
      'edge': token('edge'),
      'line': token('line'),
      'ghost': token('ghost'),
      'selected': token('selected'),
      'governs': token('governs'),
    },
    fontFamily: {
      sans: ['Manrope', '"Noto Sans Math"', 'system-ui', 'sans-serif'],
    },
    fontSize: {
      figure: [px(28), { lineHeight: px(32), fontWeight: '700' }],
      title: [px(20), { lineHeight: px(28), fontWeight: '700' }],
      head: [px(15), { lineHeight: px(20), fontWeight: '700' }],
      body: [px(13), px(20)],
      small: [px(12), px(16)],
      label: [px(11), px(16)],
      drawing: [px(9), px(12)],
    },
    borderRadius: { none: '0', DEFAULT: '2px', full: '50%' },
    boxShadow: { none: 'none', dialog: '0 8px 32px rgb(27 36 48 / .18)' },
    screens: {
      sm: '600px',
      md: '768px',
      lg: '1024px',
      /** From here the right-hand panel is docked; below it is a drawer. */
      xl: '1200px',
    },
    extend: {
      spacing: { 11: '2.75rem' },
      transitionDuration: { DEFAULT: '120ms' },
    },
  },
} satisfies Config

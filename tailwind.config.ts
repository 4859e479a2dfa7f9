import type { Config } from 'tailwindcss'

const colours = ['wall', 'surface', 'lime', 'chalk', 'line', 'quiet', 'ink', 'copper', 'slate', 'straw', 'plum', 'moss', 'madder'] as const
const rampSteps = Array.from({ length: 12 }, (_, index) => [`age-${index + 1}`, `var(--age-${index + 1})`])

/** Steps of white space: 4, 8, 12, 16, 24, 40, 64. */
const space = { 0: '0px', 1: '4px', 2: '8px', 3: '12px', 4: '16px', 5: '24px', 6: '40px', 7: '64px' }
/** Heights of what can be pressed or typed in: on a desk, a field, in the cellar, and the one that a wet glove must not miss. */
const target = { desk: '44px', field: '48px', glove: '60px', lintel: '64px', grand: '72px' }

// The theme is replaced, not extended: a value that the look does not name cannot be written.
export default {
  content: ['./app.vue', './error.vue', './{pages,layouts,components}/**/*.vue', './composables/**/*.ts'],
  corePlugins: { container: false, boxShadow: false, blur: false, backdropBlur: false },
  theme: {
    screens: { tablet: '744px', desk: '1200px', print: { raw: 'print' } },
    colors: {
      inherit: 'inherit',
      current: 'currentColor',
      transparent: 'transparent',
      ...Object.fromEntries(colours.map(name => [name, `var(--${name})`])),
      ...Object.fromEntries(rampSteps),
    },
    spacing: space,
    borderRadius: { 0: '0px', press: '3px', full: '9999px' },
    borderWidth: { 0: '0px', 1: '1px', DEFAULT: '1px', 2: '2px', 4: '4px' },
    fontFamily: { sans: ['"Source Sans 3"', '"Source Sans fallback"', 'sans-serif'] },
    fontWeight: { light: '300', plain: '400', strong: '600' },
    // Six sizes; there is no seventh.
    fontSize: {
      note: ['0.8125rem', '1.35'],
      body: ['1rem', '1.4'],
      name: ['1.25rem', '1.3'],
      title: ['1.75rem', '1.15'],
      number: ['2.75rem', '1'],
      display: ['4.5rem', '0.95'],
    },
    extend: {
      minHeight: target,
      minWidth: target,
      height: target,
      width: target,
      maxWidth: { measure: '640px', field: '400px' },
      opacity: { faded: '0.4' },
    },
  },
} satisfies Config

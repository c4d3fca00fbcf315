import type { Config } from 'tailwindcss'

const token = (name: string) => `var(--${name})`
const named = (...names: string[]) => Object.fromEntries(names.map(name => [name, token(name)]))

/** The tokens under their names, and nothing beside them: a colour that was not measured cannot be written. */
export default {
  theme: {
    colors: {
      transparent: 'transparent',
      current: 'currentColor',
      ...named('paper', 'paper-2', 'paper-3', 'ink', 'ink-2', 'hair', 'line', 'blue', 'on-blue', 'brass', 'harm', 'on-harm', 'motion', 'text', 'focus'),
    },
    fontFamily: { sans: token('sans'), mono: token('mono') },
    fontSize: Object.fromEntries(['unit', 'label', 'row', 'body', 'lead', 'head', 'tag', 'scribe'].map(size => [size, token(`t-${size}`)])),
    fontWeight: { normal: '400', semibold: '600' },
    spacing: { 0: '0px', px: '1px', 1: token('s1'), 2: token('s2'), 3: token('s3'), 4: token('s4'), 5: token('s5'), 6: token('s6'), 7: token('s7'), row: token('row'), edge: token('edge'), target: token('target') },
    borderRadius: { none: '0', full: '9999px' },
    boxShadow: { none: 'none' },
    screens: { phone: { max: '760px' }, desk: '761px', wide: '1181px' },
  },
} satisfies Partial<Config>

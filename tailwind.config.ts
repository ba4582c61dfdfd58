import type { Config } from 'tailwindcss'

const token = (name: string) => `var(--${name})`
const tokens = ['paper', 'raise', 'wash', 'cloud', 'hair', 'rule', 'ink', 'ink-2', 'ink-3', 'accent', 'accent-wash', 'error', 'error-wash', 'mark', 'mark-ink']
const ions = ['co3', 'so4', 'f', 'h2po4', 'cl', 'br', 'no3', 'i', 'clo4', 'scn']

export default {
  content: ['./components/**/*.{vue,ts}', './layouts/**/*.vue', './pages/**/*.vue', './app.vue', './error.vue'],
  darkMode: ['selector', '[data-theme="dark"]'],
  theme: {
    screens: { m: '701px', l: '1201px' },
    colors: {
      transparent: 'transparent',
      current: 'currentColor',
      ...Object.fromEntries(tokens.map(name => [name, token(name)])),
      ion: Object.fromEntries(ions.map(name => [name, token(`ion-${name}`)])),
    },
    fontFamily: { sans: ['var(--sans)'], mono: ['var(--mono)'] },
    fontSize: {
      key: ['11px', '14px'], fine: ['12px', '17px'], note: ['13px', '19px'], table: ['13.5px', '20px'],
      body: ['14px', '21px'], section: ['17px', '24px'], title: ['22px', '28px'], landing: ['44px', '50px'],
    },
    spacing: { 0: '0', px: '1px', 1: '4px', 2: '8px', 3: '12px', 4: '16px', 5: '24px', 6: '36px', 7: '56px', 8: '88px' },
    boxShadow: {},
    extend: {
      borderRadius: { DEFAULT: '3px' },
      borderColor: { DEFAULT: token('hair') },
      ringColor: { DEFAULT: token('accent') },
      maxWidth: { caption: '708px' },
      transitionDuration: { fast: '120ms', slide: '320ms' },
    },
  },
} satisfies Config

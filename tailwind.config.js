const names = [
  'paper',
  'raised',
  'sunken',
  'ink',
  'soft',
  'rule',
  'line',
  'verdigris',
  'on-verdigris',
  'verdigris-wash',
  'amber',
  'amber-wash',
  'copper',
  'copper-wash',
  'signal',
  'on-signal',
  'signal-wash',
];

/** Colours are CSS variables (app/globals.css), so that light, dark and print change them in one place. */
module.exports = {
  content: ['./app/**/*.{ts,tsx}', './components/**/*.{ts,tsx}'],
  theme: {
    extend: {
      colors: Object.fromEntries(names.map((name) => [name, `var(--${name})`])),
      fontFamily: { sans: ['var(--font-text)', 'sans-serif'], mono: ['var(--font-figures)', 'monospace'] },
      borderRadius: { sm: '2px', DEFAULT: '3px', md: '4px', lg: '6px' },
    },
  },
};

/**
 * Names for what `src/styles/tokens.css` defines. The palette of the framework is replaced, not extended: a colour that
 * is not a token has no class.
 *
 * @type {import('tailwindcss').Config}
 */
export default {
  content: ['./src/**/*.{astro,ts,tsx}'],
  theme: {
    colors: {
      transparent: 'transparent',
      current: 'currentColor',
      inherit: 'inherit',
      ink: 'var(--ink)',
      'ink-2': 'var(--ink-2)',
      'line-ink': 'var(--line-ink)',
      paper: 'var(--paper)',
      sheet: 'var(--sheet)',
      'grid-1': 'var(--grid-1)',
      'grid-2': 'var(--grid-2)',
      line: 'var(--line)',
      'hot-text': 'var(--hot-text)',
      hot: 'var(--hot-fill)',
      'hot-paper': 'var(--hot-paper)',
    },
    fontFamily: {
      sans: ['Inter', 'system-ui', 'Arial', 'sans-serif'],
      mono: ['"JetBrains Mono"', 'ui-monospace', 'Menlo', 'Consolas', 'monospace'],
    },
    fontSize: {
      '2xs': ['0.75rem', '1rem'],
      xs: ['0.8125rem', '1.125rem'],
      sm: ['0.875rem', '1.25rem'],
      base: ['0.9375rem', '1.4375rem'],
      lg: ['1.0625rem', '1.5rem'],
      xl: ['1.25rem', '1.625rem'],
      '2xl': ['1.5rem', '1.875rem'],
      '3xl': ['2rem', '2.375rem'],
      '4xl': ['3rem', '3.25rem'],
    },
    borderRadius: { none: '0', sm: '2px', DEFAULT: '4px', md: '6px', full: '9999px' },
    extend: {
      screens: { sm: '40rem', md: '52rem', lg: '64rem', xl: '80rem' },
      maxWidth: { page: '84rem', words: '42rem', form: '46rem' },
    },
  },
};

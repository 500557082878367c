import type { Config } from 'tailwindcss';

/**
 * Names for the product's own tokens. The values live in src/ui/tokens.css; the stock palette,
 * type scale and radii are replaced, not extended, so that no foreign colour or size slips in.
 */
export default {
  content: ['./index.html', './src/**/*.{ts,tsx}'],
  theme: {
    colors: {
      transparent: 'transparent',
      current: 'currentColor',
      paper: 'var(--paper)',
      sheet: 'var(--sheet)',
      well: 'var(--well)',
      wash: 'var(--wash)',
      ink: 'var(--ink)',
      'ink-2': 'var(--ink-2)',
      line: 'var(--line)',
      edge: 'var(--edge)',
      case: 'var(--case)',
      'case-deep': 'var(--case-deep)',
      'on-case': 'var(--on-case)',
      tape: 'var(--tape)',
      'tape-rim': 'var(--tape-rim)',
      'on-tape': 'var(--on-tape)',
      must: 'var(--must)',
      'must-wash': 'var(--must-wash)',
      'on-must': 'var(--on-must)',
      look: 'var(--look)',
      'look-wash': 'var(--look-wash)',
      note: 'var(--note)',
      'note-wash': 'var(--note-wash)',
      wave: 'var(--wave)',
      shade: 'var(--shade)',
      veil: 'var(--veil)',
    },
    fontFamily: {
      sans: ['"IBM Plex Sans"', 'system-ui', 'sans-serif'],
      mono: ['"IBM Plex Mono"', 'ui-monospace', 'monospace'],
    },
    fontSize: {
      micro: ['0.75rem', { lineHeight: '1.125rem' }],
      small: ['0.875rem', { lineHeight: '1.375rem' }],
      body: ['1rem', { lineHeight: '1.625rem' }],
      lead: ['1.1875rem', { lineHeight: '1.875rem' }],
      heading: ['1.25rem', { lineHeight: '1.75rem', letterSpacing: '-0.005em' }],
      section: ['1.625rem', { lineHeight: '2.125rem', letterSpacing: '-0.012em' }],
      title: ['2.125rem', { lineHeight: '2.5rem', letterSpacing: '-0.02em' }],
      display: [
        'clamp(2.375rem, 1.1rem + 4.6vw, 5rem)',
        { lineHeight: '1.02', letterSpacing: '-0.033em' },
      ],
    },
    borderRadius: {
      none: '0',
      slight: '3px',
      DEFAULT: '6px',
      panel: '8px',
      full: '9999px',
    },
    boxShadow: {
      none: 'none',
      lift: '0 1px 2px var(--shade)',
      float: '0 2px 4px var(--shade), 0 12px 32px var(--shade)',
    },
    extend: {
      maxWidth: { page: '82rem', prose: '38rem', form: '27rem' },
    },
  },
} satisfies Config;

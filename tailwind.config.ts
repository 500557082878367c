import type { Config } from 'tailwindcss';

/** Tokens are CSS variables (src/ui/tokens.css); this file only gives them Tailwind names. */
export default {
  content: ['./index.html', './src/**/*.{ts,tsx}'],
} satisfies Config;

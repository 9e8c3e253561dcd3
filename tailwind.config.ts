import type { Config } from 'tailwindcss';

/** The drawing sheet's tokens; their values for day, night, print and the two densities are in app/globals.css. */
const config: Config = {
  content: ['./app/**/*.{ts,tsx}', './components/**/*.{ts,tsx}'],
  theme: {
    colors: {
      transparent: 'transparent',
      current: 'currentColor',
      inherit: 'inherit',
      paper: 'var(--paper)',
      sheet: 'var(--sheet)',
      rule: 'var(--rule)',
      ink: 'var(--ink)',
      pencil: 'var(--pencil)',
      chalk: 'var(--chalk)',
      hold: 'var(--hold)',
      watch: 'var(--watch)',
      met: 'var(--met)',
      steel: 'var(--steel)',
      band: 'var(--band)',
    },
    fontFamily: {
      sans: ['Barlow', 'system-ui', 'sans-serif'],
      label: ['Barlow Semi Condensed', 'Barlow', 'system-ui', 'sans-serif'],
      figure: ['IBM Plex Mono', 'ui-monospace', 'monospace'],
    },
    extend: {
      fontSize: {
        body: ['var(--text-body)', { lineHeight: '1.45' }],
        label: ['var(--text-label)', { lineHeight: '1.3' }],
        lead: ['var(--text-lead)', { lineHeight: '1.35' }],
        heading: ['var(--text-heading)', { lineHeight: '1.2' }],
        title: ['var(--text-title)', { lineHeight: '1.15' }],
      },
      spacing: { target: 'var(--target)', pad: 'var(--pad)' },
    },
  },
};

export default config;

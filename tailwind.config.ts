import type { Config } from 'tailwindcss';

/** The printed concert bill: ink on warm paper, thin rules, one brass accent, Clarendon headings. Colours carry meaning only. */
const config: Config = {
  content: ['./app/**/*.{ts,tsx}', './components/**/*.{ts,tsx}'],
  theme: {
    extend: {
      colors: {
        paper: '#fbf8f1',
        sheet: '#ffffff',
        wash: '#f3eee2',
        rule: { DEFAULT: '#e0d8c6', strong: '#bfb49b' },
        ink: { DEFAULT: '#1c2130', 2: '#4b5063', 3: '#686c7d' },
        brass: { DEFAULT: '#8f4f0e', fill: '#b8691a', wash: '#f8ead6' },
        felt: { DEFAULT: '#1d6548', wash: '#e0f0e6' },
        brick: { DEFAULT: '#a22c22', wash: '#fae4df' },
        petrol: { DEFAULT: '#1d5a73', wash: '#dfeef3' },
        plum: { DEFAULT: '#6a3564', wash: '#f2e4f0' },
      },
      fontFamily: {
        display: ['var(--font-besley)', 'var(--font-besley-ext)', 'var(--font-music)', 'Georgia', 'serif'],
        sans: ['var(--font-hanken)', 'var(--font-hanken-ext)', 'var(--font-music)', 'Helvetica', 'Arial', 'sans-serif'],
      },
      fontSize: {
        eyebrow: ['12px', { lineHeight: '1.4', letterSpacing: '.08em', fontWeight: '650' }],
        small: ['13px', '1.45'],
        base: ['15px', '1.5'],
        lead: ['17px', '1.45'],
        h3: ['16px', '1.25'],
        h2: ['19px', '1.2'],
        h1: ['28px', '1.2'],
        figure: ['40px', '1.1'],
      },
      borderRadius: { DEFAULT: '4px' },
    },
  },
};

export default config;

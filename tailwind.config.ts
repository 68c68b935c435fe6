import type { Config } from 'tailwindcss';

const role = (name: string) => `var(--${name})`;

/** Role names only: every colour and family is a variable of apps/portal/src/index.css, where light and dark live. */
export default {
  content: ['./index.html', './apps/portal/src/**/*.{ts,tsx}'],
  darkMode: ['selector', '[data-theme="dark"]'],
  theme: {
    extend: {
      colors: {
        paper: role('paper'),
        sheet: role('sheet'),
        rule: role('rule'),
        graphite: role('graphite'),
        pencil: role('pencil'),
        marking: role('marking'),
        brass: role('brass'),
        verdigris: role('verdigris'),
        vermilion: role('vermilion'),
        plum: role('plum'),
      },
      fontFamily: { sans: role('family-text'), mono: role('family-mono') },
      borderRadius: { DEFAULT: '2px', max: '3px' },
      spacing: { row: '32px' },
    },
  },
} satisfies Config;

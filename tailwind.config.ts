// The ink, paper and type of look.md as utility names; the values are the variables of src/index.css.
import type { Config } from 'tailwindcss';

const config: Config = {
  content: [],
  theme: {
    colors: {
      transparent: 'transparent',
      current: 'currentColor',
      paper: 'var(--paper)',
      sheet: 'var(--sheet)',
      ink: 'var(--ink)',
      ash: 'var(--ash)',
      rule: 'var(--rule)',
      lamp: 'var(--lamp)',
      'on-lamp': 'var(--on-lamp)',
      madder: 'var(--madder)',
      verdigris: 'var(--verdigris)',
    },
    fontFamily: { serif: 'var(--serif)', sans: 'var(--sans)' },
    fontSize: { 14: '14px', 16: '16px', 18: '18px', 22: '22px', 28: '28px', 40: '40px', 64: '64px' },
    spacing: { 0: '0', 1: '8px', 2: '16px', 3: '24px', 4: '32px', 5: '40px', 6: '48px', 8: '64px' },
  },
};
export default config;

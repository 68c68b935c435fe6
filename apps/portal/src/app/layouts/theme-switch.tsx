import { useState } from 'react';
import { Button } from '../../components/ui/button.tsx';
import { chooseTheme, storedTheme, type ThemeChoice } from '../../lib/theme.ts';

const next: Record<ThemeChoice, ThemeChoice> = { system: 'light', light: 'dark', dark: 'system' };
const words: Record<ThemeChoice, string> = { system: 'as the system', light: 'light', dark: 'dark' };

/** Goes round: as the system, light, dark. */
export function ThemeSwitch() {
  const [choice, setChoice] = useState(storedTheme);
  const label = `Theme: ${words[choice]}. Change to ${words[next[choice]]}`;
  return (
    <Button
      weight="quiet"
      size="small"
      aria-label={label}
      title={label}
      onClick={() => {
        chooseTheme(next[choice]);
        setChoice(next[choice]);
      }}
    >
      <svg aria-hidden="true" viewBox="0 0 16 16" className="size-4 fill-none stroke-current stroke-[1.4]">
        <rect x="1.5" y="2.5" width="13" height="11" />
        {choice !== 'light' && (
          <path d={choice === 'dark' ? 'M1.5 2.5h13v11h-13z' : 'M8 2.5h6.5v11H8z'} className="fill-current" />
        )}
      </svg>
    </Button>
  );
}

import { useState } from 'react';
import { cn } from '../../lib/cn.ts';
import { Button } from './button.tsx';

export interface CopyableProps {
  value: string;
  /** What it is, for the button's name: `digest`. */
  what: string;
  /** Cut in the middle to this many characters on screen; copied whole. */
  shorten?: number;
}

/** A code to take along: digest, number, address. */
export function Copyable({ value, what, shorten }: CopyableProps) {
  const [copied, setCopied] = useState(false);
  const copy = async () => {
    try {
      await navigator.clipboard.writeText(value);
      setCopied(true);
      setTimeout(() => setCopied(false), 2000);
    } catch {
      setCopied(false);
    }
  };
  const cut = shorten !== undefined && value.length > shorten + 1;
  return (
    <span className="inline-flex max-w-full items-center gap-1">
      <code className={cn('figures break-all', cut && 'print:hidden')} title={cut ? value : undefined}>
        {cut ? `${value.slice(0, shorten / 2)}…${value.slice(-shorten / 2)}` : value}
      </code>
      {cut && <code className="figures hidden break-all print:inline">{value}</code>}
      <Button
        size="small"
        weight="quiet"
        className="no-print"
        aria-label={`Copy the ${what}`}
        onClick={() => void copy()}
      >
        {copied ? 'Copied' : 'Copy'}
      </Button>
    </span>
  );
}

import { useEffect, useState } from 'react';
import { packageStates, type PackageState } from '@trammel/shared/status';
import { SelectField } from '../../../components/ui/select-field.tsx';
import { packageStateWords } from '../../../components/ui/state-badge.tsx';
import { TextField } from '../../../components/ui/text-field.tsx';
import { useKeys } from '../../../lib/use-keys.ts';

export interface DeskFiltersProps {
  q: string;
  state: string;
  show: string;
  /** What the short and the long list are called here. */
  shows: readonly { value: string; label: string }[];
  searchHint: string;
  onChange: (change: { q?: string; state?: string; show?: string }) => void;
}

const quiet = 350;

/** Search, state and extent of a desk; all of it stands in the address. */
export function DeskFilters({ q, state, show, shows, searchHint, onChange }: DeskFiltersProps) {
  const [typed, setTyped] = useState(q);
  const [known, setKnown] = useState(q);
  if (q !== known) {
    // The address moved by itself: back, a pasted link, the search of the top bar.
    setKnown(q);
    setTyped(q);
  }
  useEffect(() => {
    if (typed === q) return;
    const timer = setTimeout(() => onChange({ q: typed }), quiet);
    return () => clearTimeout(timer);
  }, [typed, q, onChange]);

  useKeys('Desk', [
    { keys: '/', label: 'Search', run: () => document.getElementById('desk-search')?.focus() },
    { keys: 'ArrowDown', label: 'Next package, once one has the focus' },
    { keys: 'Enter', label: 'Open the package' },
  ]);

  return (
    <search className="no-print mb-3 flex flex-wrap items-end gap-3">
      <TextField
        id="desk-search"
        label="Search"
        type="search"
        placeholder={searchHint}
        maxLength={100}
        value={typed}
        onChange={setTyped}
        className="min-w-48 flex-1 basis-60 sm:max-w-80"
      />
      <SelectField<PackageState | ''>
        id="desk-state"
        label="State"
        value={state as PackageState | ''}
        onChange={(value) => onChange({ state: value })}
        options={[
          { value: '', label: 'Every state' },
          ...packageStates.map((value) => ({ value, label: packageStateWords[value] })),
        ]}
      />
      <SelectField
        id="desk-show"
        label="Show"
        value={show}
        onChange={(value) => onChange({ show: value })}
        options={shows}
      />
    </search>
  );
}

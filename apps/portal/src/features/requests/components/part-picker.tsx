import { useQuery } from '@tanstack/react-query';
import { useEffect, useState } from 'react';
import { Notice } from '../../../components/ui/notice.tsx';
import { SelectField } from '../../../components/ui/select-field.tsx';
import { TextField } from '../../../components/ui/text-field.tsx';
import { partOptionQuery, partOptionsQuery } from '../api.ts';
import type { RequestFieldsProps } from './request-fields.tsx';

const quiet = 300;

/** Finds a part by number or name, then its revision; the released one is chosen by itself. */
export function PartPicker({ values, set, errorOf, idOf }: RequestFieldsProps) {
  const [typed, setTyped] = useState('');
  const [q, setQ] = useState('');
  useEffect(() => {
    const timer = setTimeout(() => setQ(typed.trim()), quiet);
    return () => clearTimeout(timer);
  }, [typed]);
  const { data: found } = useQuery(partOptionsQuery(q));
  const { data: part } = useQuery(partOptionQuery(values.partId));

  const released = part?.revisions.find((revision) => revision.state === 'released');
  const belongs = part?.revisions.some((revision) => revision.id === values.revisionId) ?? true;
  useEffect(() => {
    if (part && part.id === values.partId && (values.revisionId === '' || !belongs)) {
      set({ revisionId: released?.id ?? part.revisions.at(-1)?.id ?? '' });
    }
  }, [part, released, belongs, values.partId, values.revisionId, set]);

  const parts = found?.items ?? [];
  const listed = part && !parts.some((one) => one.id === part.id) ? [part, ...parts] : parts;
  const chosen = part?.revisions.find((revision) => revision.id === values.revisionId);
  return (
    <>
      <div className="grid gap-4 md:grid-cols-[200px_minmax(0,1fr)_200px]">
        <TextField
          id={idOf('partSearch')}
          label="Find the part"
          type="search"
          placeholder="Number or name"
          value={typed}
          onChange={setTyped}
        />
        <SelectField
          id={idOf('partId')}
          label="Part"
          value={values.partId}
          onChange={(partId) => set({ partId, revisionId: '' })}
          options={[
            { value: '', label: listed.length === 0 ? 'No part matches' : 'Choose a part', disabled: true },
            ...listed.map((one) => ({ value: one.id, label: `${one.number} ${one.name}` })),
          ]}
        />
        <SelectField
          id={idOf('revisionId')}
          label="Revision"
          error={errorOf('revisionId')}
          value={values.revisionId}
          onChange={(revisionId) => set({ revisionId })}
          options={[
            { value: '', label: 'Choose', disabled: true },
            ...(part?.revisions ?? []).map((revision) => ({
              value: revision.id,
              label: `${revision.code}, ${revision.state}`,
            })),
          ]}
        />
      </div>
      {chosen && chosen.state !== 'released' && (
        <Notice tone="attention">
          Revision {chosen.code} is {chosen.state}. A request can be drafted on it, and issued once a revision
          is released.
        </Notice>
      )}
    </>
  );
}

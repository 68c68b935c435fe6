import { useQueryClient, useSuspenseQuery } from '@tanstack/react-query';
import { Suspense, useState } from 'react';
import { Button } from '../../../components/ui/button.tsx';
import { EmptyState } from '../../../components/ui/empty-state.tsx';
import { Loading } from '../../../components/ui/loading.tsx';
import { deviationsQuery } from '../api.ts';
import { DeviationCard } from './deviation-card.tsx';
import { DeviationForm } from './deviation-form.tsx';

interface DeviationsPageProps {
  submissionId: string;
  streamNames: ReadonlyMap<string, string>;
  mayAsk: boolean;
}

export function DeviationsPage({ submissionId, streamNames, mayAsk }: DeviationsPageProps) {
  const { data } = useSuspenseQuery(deviationsQuery(submissionId));
  const client = useQueryClient();
  const [form, setForm] = useState<{ id: string | null } | null>(null);
  const refresh = () => {
    setForm(null);
    void client.invalidateQueries({ queryKey: ['submission', submissionId] });
  };
  const edited = data.items.find((deviation) => deviation.id === form?.id) ?? null;
  return (
    <div className="flex flex-col gap-4">
      {form !== null && (
        <Suspense fallback={<Loading />}>
          <DeviationForm
            key={form.id ?? 'new'}
            submissionId={submissionId}
            deviation={edited}
            onDone={refresh}
            onCancel={() => setForm(null)}
          />
        </Suspense>
      )}
      {mayAsk && form === null && (
        <div>
          <Button weight="primary" onClick={() => setForm({ id: null })}>
            Ask for a deviation
          </Button>
        </div>
      )}
      {data.items.length === 0 && form === null && (
        <EmptyState title="No deviation requests">
          {mayAsk
            ? 'A row out of tolerance stops submission until the process is mended, its stream is blocked, or a deviation is asked for here.'
            : 'The supplier has asked for no deviation in this round.'}
        </EmptyState>
      )}
      {data.items.map((deviation) => (
        <DeviationCard
          key={deviation.id}
          deviation={deviation}
          streamNames={streamNames}
          onChanged={refresh}
          onEdit={() => setForm({ id: deviation.id })}
        />
      ))}
    </div>
  );
}

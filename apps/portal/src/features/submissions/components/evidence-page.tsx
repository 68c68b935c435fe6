import { useSuspenseQuery } from '@tanstack/react-query';
import type { SubmissionResponse } from '@trammel/shared/submissions';
import { EmptyState } from '../../../components/ui/empty-state.tsx';
import { elementsQuery, piecesQuery } from '../api.ts';
import { ElementCard } from './element-card.tsx';
import { PiecesEditor } from './pieces-editor.tsx';
import { StreamsPanel } from './streams-panel.tsx';

/** Streams, sample pieces and elements of a round. */
export function EvidencePage({ submission }: { submission: SubmissionResponse }) {
  if (submission.side === 'customer' && submission.submittedAt === null) {
    return (
      <EmptyState title="The evidence is still with the supplier">
        {submission.supplier.name} collects it and hands it in by signing the warrant. From then on it can be
        read here.
      </EmptyState>
    );
  }
  if (submission.state === 'requested') {
    return (
      <EmptyState title="The request has not been acknowledged">
        Acknowledge it on the overview; then evidence can be collected here.
      </EmptyState>
    );
  }
  return <Evidence submission={submission} />;
}

function Evidence({ submission }: { submission: SubmissionResponse }) {
  const { data: elements } = useSuspenseQuery(elementsQuery(submission.id));
  const { data: pieces } = useSuspenseQuery(piecesQuery(submission.id));
  const asked = elements.items.filter((element) => element.demand !== 'not-required');
  const others = elements.items.filter((element) => element.demand === 'not-required');
  const open = asked.filter((element) => element.state === 'open').length;
  return (
    <div className="flex flex-col gap-8">
      <section aria-labelledby="elements">
        <h2 id="elements">Elements</h2>
        <p className="mb-3 text-pencil">
          {open === 0 ? 'Every element asked for is met.' : `${open} of ${asked.length} elements are open.`}
        </p>
        <div className="border border-rule bg-sheet">
          {asked.map((element) => (
            <ElementCard
              key={element.id}
              element={element}
              submission={submission}
              editable={pieces.editable}
            />
          ))}
        </div>
        {others.length > 0 && (
          <details className="mt-3">
            <summary className="cursor-pointer text-pencil">
              Elements that are not required ({others.length})
            </summary>
            <div className="mt-2 border border-rule bg-sheet">
              {others.map((element) => (
                <ElementCard
                  key={element.id}
                  element={element}
                  submission={submission}
                  editable={pieces.editable}
                />
              ))}
            </div>
          </details>
        )}
      </section>
      <StreamsPanel submission={submission} streams={pieces.streams} editable={pieces.editable} />
      <PiecesEditor submission={submission} {...pieces} />
    </div>
  );
}

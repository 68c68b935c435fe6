import { useQuery, useQueryClient } from '@tanstack/react-query';
import { writeMessageRequest, type RequestMessageItem, type RequestResponse } from '@trammel/shared/requests';
import { Button } from '../../../components/ui/button.tsx';
import { RadioGroup } from '../../../components/ui/choice-fields.tsx';
import { EmptyState } from '../../../components/ui/empty-state.tsx';
import { ErrorSummary } from '../../../components/ui/error-summary.tsx';
import { Loading, LoadFailure } from '../../../components/ui/loading.tsx';
import { TextArea } from '../../../components/ui/text-area.tsx';
import { Moment } from '../../../components/ui/time.tsx';
import { cn } from '../../../lib/cn.ts';
import { useForm } from '../../../lib/use-form.ts';
import { requestQuery, threadQuery, writeMessage } from '../api.ts';

type Kind = RequestMessageItem['kind'];

const kindWords: Record<Kind, string> = { question: 'Question', answer: 'Answer', note: 'Note' };

/** What both sides wrote; each message goes to the other side by mail as well. */
export function RequestThread({ request }: { request: RequestResponse }) {
  const { data, error, isPending, refetch } = useQuery(threadQuery(request.id));
  if (isPending) return <Loading label="Loading the thread" />;
  if (error) return <LoadFailure what="The thread" error={error} onRetry={() => void refetch()} />;
  const asked = data.items.findLast((message) => message.kind === 'question');
  const mayAnswer = request.questionOpen && asked !== undefined && !asked.own;
  return (
    <div className="flex flex-col gap-3">
      {data.items.length === 0 ? (
        <EmptyState title="Nothing was written yet">
          Questions and answers stand here for both sides and stay with the request.
        </EmptyState>
      ) : (
        <ol className="flex flex-col gap-2">
          {data.items.map((message) => (
            <Message key={message.id} message={message} open={request.questionOpen && message === asked} />
          ))}
        </ol>
      )}
      {request.abilities.write && <Writer key={String(mayAnswer)} request={request} mayAnswer={mayAnswer} />}
    </div>
  );
}

function Message({ message, open }: { message: RequestMessageItem; open: boolean }) {
  return (
    <li className={cn('border border-rule bg-sheet px-3 py-2', message.own ? 'sm:ml-10' : 'sm:mr-10')}>
      <p className="flex flex-wrap items-baseline gap-x-3">
        <span className="font-semibold">{kindWords[message.kind]}</span>
        {open && <span className="text-plum">open</span>}
        <span className="caption">
          {message.author}, {message.organisation}, <Moment at={message.writtenAt} />
        </span>
      </p>
      <p className="mt-1 max-w-prose break-words whitespace-pre-line">{message.text}</p>
    </li>
  );
}

function Writer({ request, mayAnswer }: { request: RequestResponse; mayAnswer: boolean }) {
  const client = useQueryClient();
  const first: Kind = mayAnswer ? 'answer' : request.side === 'supplier' ? 'question' : 'note';
  const form = useForm({
    initial: { kind: first, text: '' },
    schema: writeMessageRequest,
    onSubmit: async (_values, body) => {
      const thread = await writeMessage(request.id, body);
      client.setQueryData(threadQuery(request.id).queryKey, thread);
      form.setAll({ kind: first, text: '' });
      await client.invalidateQueries({ queryKey: requestQuery(request.id).queryKey });
    },
  });
  const kinds: Kind[] = mayAnswer ? ['answer', 'question', 'note'] : ['question', 'note'];
  const other = request.side === 'supplier' ? request.customer.name : request.supplier.name;
  return (
    <form
      className="no-print flex flex-col gap-3 border-t border-rule pt-3"
      onSubmit={(event) => void form.submit(event)}
    >
      <ErrorSummary errors={form.errors} idOf={form.idOf} failure={form.failure} />
      <RadioGroup
        {...form.field('kind')}
        label="Write"
        inline
        options={kinds.map((value) => ({ value, label: kindWords[value] }))}
      />
      <TextArea {...form.field('text')} label={`To ${other}`} maxLength={4000} />
      <div>
        <Button type="submit" weight="primary" busy={form.busy} busyLabel="Sending…">
          Send
        </Button>
      </div>
    </form>
  );
}

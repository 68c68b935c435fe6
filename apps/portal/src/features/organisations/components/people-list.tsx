import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import type { PersonResponse } from '@trammel/shared/accounts';
import { useMemo, useState } from 'react';
import { Button } from '../../../components/ui/button.tsx';
import { ConfirmDialog } from '../../../components/ui/confirm-dialog.tsx';
import { DataTable, type DataColumn } from '../../../components/ui/data-table.tsx';
import { EmptyState } from '../../../components/ui/empty-state.tsx';
import { Loading, LoadFailure } from '../../../components/ui/loading.tsx';
import { Menu } from '../../../components/ui/menu.tsx';
import { Notice } from '../../../components/ui/notice.tsx';
import { TextField } from '../../../components/ui/text-field.tsx';
import { Moment } from '../../../components/ui/time.tsx';
import { showToast } from '../../../components/ui/toast.tsx';
import { newIdempotencyKey } from '../../../lib/api-client.ts';
import { reasonOf } from '../../../lib/api-problem.ts';
import { countOf } from '../../../lib/format.ts';
import { roleWords, useSession } from '../../../lib/session.ts';
import { useUrlState } from '../../../lib/use-url-state.ts';
import { changePerson, endSessionsOf, inviteAgain, peopleQuery } from '../api.ts';
import { PersonDialog } from './person-dialog.tsx';

const stateWords: Record<PersonResponse['state'], string> = {
  invited: 'invited, not yet accepted',
  active: 'active',
  disabled: 'closed',
};

/** Everybody of the organisation, with the acts of an administrator. */
export function PeopleList() {
  const { user, organisation } = useSession();
  const { data, error, isPending, refetch } = useQuery(peopleQuery);
  const [view, change] = useUrlState({ q: '', sort: 'name' });
  const [edited, setEdited] = useState<PersonResponse | 'new' | null>(null);
  const [closing, setClosing] = useState<PersonResponse | null>(null);
  const client = useQueryClient();
  const refresh = () => client.invalidateQueries({ queryKey: peopleQuery.queryKey });
  const again = useMutation({
    mutationFn: (person: PersonResponse) => inviteAgain(person.id, newIdempotencyKey()),
    onSuccess: (_, person) => showToast({ text: `A new invitation is on its way to ${person.email}` }),
  });
  const endAll = useMutation({
    mutationFn: (person: PersonResponse) => endSessionsOf(person.id),
    onSuccess: (_, person) => showToast({ text: `${person.name} is signed out everywhere` }),
  });
  const open = async (person: PersonResponse, disabled: boolean) => {
    const { name, title, roles, maySign } = person;
    await changePerson(person.id, { name, title, roles, maySign, disabled }, person.version);
    showToast({
      text: disabled ? `The account of ${name} is closed` : `The account of ${name} is open again`,
    });
    await refresh();
  };
  const reopen = useMutation({ mutationFn: (person: PersonResponse) => open(person, false) });

  const wanted = view.q.trim().toLowerCase();
  const rows = useMemo(
    () =>
      (data?.items ?? []).filter((row) =>
        `${row.name} ${row.email} ${row.title}`.toLowerCase().includes(wanted),
      ),
    [data, wanted],
  );
  if (isPending) return <Loading />;
  if (error) return <LoadFailure what="The people" error={error} onRetry={() => void refetch()} />;

  const failure = again.error ?? endAll.error ?? reopen.error;
  const columns: DataColumn<PersonResponse>[] = [
    {
      id: 'name',
      header: 'Name',
      sort: (row) => row.name,
      cell: (row) => <span className="font-medium">{row.name}</span>,
    },
    { id: 'title', header: 'Title', sort: (row) => row.title, cell: (row) => row.title },
    { id: 'email', header: 'Mail address', sort: (row) => row.email, cell: (row) => row.email },
    {
      id: 'roles',
      header: 'Roles',
      wrap: true,
      cell: (row) => row.roles.map((role) => roleWords[role]).join(', ') + (row.maySign ? ', may sign' : ''),
    },
    { id: 'state', header: 'Account', sort: (row) => row.state, cell: (row) => stateWords[row.state] },
    {
      id: 'seen',
      header: 'Last seen',
      from: 'lg',
      sort: (row) => row.lastSeenAt,
      cell: (row) => (row.lastSeenAt === null ? '—' : <Moment at={row.lastSeenAt} />),
    },
    {
      id: 'acts',
      header: 'Acts',
      headerHidden: true,
      align: 'end',
      cell: (row) => (
        <Menu
          label="Act"
          accessibleLabel={`Act on the account of ${row.name}`}
          size="small"
          items={[
            { label: 'Change', onSelect: () => setEdited(row) },
            ...(row.state === 'invited'
              ? [{ label: 'Send the invitation again', onSelect: () => again.mutate(row) }]
              : []),
            ...(row.state === 'active'
              ? [{ label: 'Sign out everywhere', onSelect: () => endAll.mutate(row) }]
              : []),
            ...(row.state === 'disabled'
              ? [{ label: 'Open again', onSelect: () => reopen.mutate(row) }]
              : []),
            ...(row.state !== 'disabled' && row.id !== user.id
              ? [{ label: 'Close the account', danger: true, onSelect: () => setClosing(row) }]
              : []),
          ]}
        />
      ),
    },
  ];

  return (
    <>
      <div className="flex flex-col gap-3">
        {failure && (
          <Notice tone="failure" live>
            {reasonOf(failure)}
          </Notice>
        )}
        <div className="flex flex-wrap items-end gap-4">
          <TextField
            id="people-search"
            label="Search"
            type="search"
            className="w-64"
            value={view.q}
            onChange={(q) => change({ q })}
          />
          <span className="pb-1.5 text-pencil" role="status">
            {countOf(rows.length, 'person', 'people')}
          </span>
          <div className="ml-auto">
            <Button weight="primary" onClick={() => setEdited('new')}>
              Invite a person
            </Button>
          </div>
        </div>
        <DataTable
          caption={`People of ${organisation.name}`}
          columns={columns}
          rows={rows}
          rowId={(row) => row.id}
          sort={view.sort}
          onSort={(sort) => change({ sort })}
          sortHere
          empty={
            <EmptyState
              title="Nobody by that name"
              actions={<Button onClick={() => change({ q: '' })}>Show everybody</Button>}
            >
              The search looks at name, mail address and title. Somebody who is missing has to be invited by
              an administrator.
            </EmptyState>
          }
        />
      </div>
      {edited !== null && (
        <PersonDialog
          key={edited === 'new' ? 'new' : edited.id + edited.version}
          person={edited === 'new' ? null : edited}
          onClose={() => setEdited(null)}
        />
      )}
      <ConfirmDialog
        open={closing !== null}
        onClose={() => setClosing(null)}
        title={`Close the account of ${closing?.name ?? ''}?`}
        consequence="All sessions end at once and no new one can begin. What this person signed and wrote stays. The account can be opened again."
        confirmLabel="Close the account"
        danger
        onConfirm={async () => {
          if (closing) await open(closing, true);
        }}
      />
    </>
  );
}

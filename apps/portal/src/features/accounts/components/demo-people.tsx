import { useMutation, useQuery } from '@tanstack/react-query';
import type { DemoPeopleResponse, SessionResponse } from '@trammel/shared/accounts';
import { Notice } from '../../../components/ui/notice.tsx';
import { reasonOf } from '../../../lib/api-problem.ts';
import { demoPeopleQuery, signIn } from '../api.ts';

type Person = DemoPeopleResponse['people'][number];

/** In a demonstration the people are offered by name and desk; elsewhere this is nothing. */
export function DemoPeople({ onSignedIn }: { onSignedIn: (session: SessionResponse) => void }) {
  const { data } = useQuery(demoPeopleQuery);
  const enter = useMutation({ mutationFn: signIn, onSuccess: onSignedIn });
  if (!data) return null;
  return (
    <section aria-labelledby="demo-people">
      <h2 id="demo-people">Or try it as one of the demo people</h2>
      <p className="mt-1 mb-3 text-pencil">
        Everything here is invented. Each person opens on their own desk. The password of all of them is{' '}
        <code className="figures">{data.password}</code>.
      </p>
      {enter.isError && (
        <div className="mb-3">
          <Notice tone="failure" live>
            {reasonOf(enter.error)}
          </Notice>
        </div>
      )}
      <div className="grid gap-x-6 gap-y-4 sm:grid-cols-2">
        {byOrganisation(data.people).map(([organisation, people]) => (
          <div key={organisation}>
            <h3 className="mb-1">{organisation}</h3>
            <ul className="border border-rule bg-sheet">
              {people.map((person) => (
                <li key={person.email} className="border-b border-rule last:border-b-0">
                  <button
                    type="button"
                    disabled={enter.isPending}
                    onClick={() => enter.mutate({ email: person.email, password: data.password })}
                    className="flex w-full flex-col px-3 py-1.5 text-start -outline-offset-2 hover:bg-marking/8"
                  >
                    <span className="font-medium text-marking">{person.name}</span>
                    <span className="text-[0.8125rem] text-pencil">
                      {person.title === '' ? person.desk : `${person.title} · ${person.desk}`}
                    </span>
                  </button>
                </li>
              ))}
            </ul>
          </div>
        ))}
      </div>
    </section>
  );
}

function byOrganisation(people: readonly Person[]): [string, Person[]][] {
  const groups = new Map<string, Person[]>();
  for (const person of people)
    groups.set(person.organisation, [...(groups.get(person.organisation) ?? []), person]);
  return [...groups];
}

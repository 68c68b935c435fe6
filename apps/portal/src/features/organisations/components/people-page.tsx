import { PageHead } from '../../../components/ui/page-head.tsx';
import { Tabs } from '../../../components/ui/tabs.tsx';
import { useSession } from '../../../lib/session.ts';
import { PeopleList } from './people-list.tsx';
import { SiteList } from './site-list.tsx';

export function PeoplePage() {
  const { organisation } = useSession();
  return (
    <>
      <PageHead
        title="People"
        lead={`Who may act for ${organisation.name}, in which role, and who may sign; and the sites where it makes parts.`}
      />
      <Tabs
        label="People and sites"
        tabs={[
          { id: 'people', label: 'People', content: () => <PeopleList /> },
          { id: 'sites', label: 'Sites', content: () => <SiteList /> },
        ]}
      />
    </>
  );
}

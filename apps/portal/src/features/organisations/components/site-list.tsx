import { useQuery, useQueryClient } from '@tanstack/react-query';
import { addSiteRequest, type SiteResponse } from '@trammel/shared/organisations';
import { Button } from '../../../components/ui/button.tsx';
import { DataTable, type DataColumn } from '../../../components/ui/data-table.tsx';
import { EmptyState } from '../../../components/ui/empty-state.tsx';
import { ErrorSummary } from '../../../components/ui/error-summary.tsx';
import { Loading, LoadFailure } from '../../../components/ui/loading.tsx';
import { TextField } from '../../../components/ui/text-field.tsx';
import { showToast } from '../../../components/ui/toast.tsx';
import { useForm } from '../../../lib/use-form.ts';
import { addSite, ownOrganisationQuery } from '../api.ts';

const columns: DataColumn<SiteResponse>[] = [
  { id: 'name', header: 'Site', cell: (row) => <span className="font-medium">{row.name}</span> },
  { id: 'address', header: 'Address', wrap: true, cell: (row) => row.address || '—' },
];

/** Sites that a request can name as the place where the part is made. */
export function SiteList() {
  const client = useQueryClient();
  const { data, error, isPending, refetch } = useQuery(ownOrganisationQuery);
  const empty = { name: '', address: '' };
  const form = useForm({
    initial: empty,
    schema: addSiteRequest,
    onSubmit: async (values) => {
      await addSite(values);
      form.setAll(empty);
      showToast({ text: `${values.name} is added` });
      await client.invalidateQueries({ queryKey: ownOrganisationQuery.queryKey });
    },
  });
  if (isPending) return <Loading />;
  if (error) return <LoadFailure what="The sites" error={error} onRetry={() => void refetch()} />;
  return (
    <div className="flex flex-col gap-6">
      <DataTable
        caption={`Sites of ${data.name}`}
        columns={columns}
        rows={data.sites}
        rowId={(row) => row.id}
        empty={
          <EmptyState title="No site yet">
            Add the first one below; customers then name it in their requests.
          </EmptyState>
        }
      />
      <form
        noValidate
        aria-labelledby="add-site"
        onSubmit={(event) => void form.submit(event)}
        className="flex max-w-sm flex-col gap-4"
      >
        <h2 id="add-site">Add a site</h2>
        <ErrorSummary errors={form.errors} idOf={form.idOf} failure={form.failure} />
        <TextField {...form.field('name')} label="Name" autoComplete="off" />
        <TextField {...form.field('address')} label="Address" optional autoComplete="off" />
        <div>
          <Button type="submit" weight="primary" busy={form.busy} busyLabel="Adding…">
            Add the site
          </Button>
        </div>
      </form>
    </div>
  );
}

import { EmptyState } from '../../../components/ui/empty-state.tsx';
import { SelectField } from '../../../components/ui/select-field.tsx';
import type { RequestFieldsProps } from './request-fields.tsx';

export function SupplierPicker({ values, set, errorOf, idOf, options }: RequestFieldsProps) {
  const supplier = options.suppliers.find((one) => one.id === values.supplierId);
  if (options.suppliers.length === 0) {
    return (
      <EmptyState title="No supplier is linked yet">
        An administrator of your organisation invites suppliers under Suppliers; then they can be asked here.
      </EmptyState>
    );
  }
  const choose = (supplierId: string) => {
    const sites = options.suppliers.find((one) => one.id === supplierId)?.sites ?? [];
    set({ supplierId, siteId: sites.length === 1 ? (sites[0]?.id ?? '') : '' });
  };
  return (
    <div className="grid gap-4 md:grid-cols-2">
      <SelectField
        id={idOf('supplierId')}
        label="Supplier"
        error={errorOf('supplierId')}
        value={values.supplierId}
        onChange={choose}
        options={[
          { value: '', label: 'Choose a supplier', disabled: true },
          ...options.suppliers.map((one) => ({ value: one.id, label: one.name })),
        ]}
      />
      <SelectField
        id={idOf('siteId')}
        label="Site that makes the part"
        error={errorOf('siteId')}
        value={values.siteId}
        disabled={!supplier}
        onChange={(siteId) => set({ siteId })}
        options={[
          { value: '', label: supplier ? 'Choose a site' : 'Choose the supplier first', disabled: true },
          ...(supplier?.sites ?? []).map((site) => ({ value: site.id, label: site.name })),
        ]}
      />
    </div>
  );
}

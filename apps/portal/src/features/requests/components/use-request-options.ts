import { useSuspenseQueries } from '@tanstack/react-query';
import { elementTemplateQuery, reviewerOptionsQuery, supplierOptionsQuery } from '../api.ts';

/** Suppliers, reviewers and the element lists to choose from. */
export function useRequestOptions() {
  const [suppliers, reviewers, template] = useSuspenseQueries({
    queries: [supplierOptionsQuery, reviewerOptionsQuery, elementTemplateQuery],
  });
  return {
    suppliers: suppliers.data.items,
    reviewers: reviewers.data.items,
    template: template.data.levels,
    templateSource: template.data.source,
  };
}

export type RequestOptions = ReturnType<typeof useRequestOptions>;

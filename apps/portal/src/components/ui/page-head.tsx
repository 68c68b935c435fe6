import type { ReactNode } from 'react';

export interface PageHeadProps {
  title: string;
  /** One line that says what the page answers. */
  lead?: ReactNode;
  actions?: ReactNode;
  /** Title of the browser tab where it says more than the heading. */
  documentTitle?: string;
}

/** Heading of a page and its title in the browser tab: one on each page. */
export function PageHead({ title, lead, actions, documentTitle }: PageHeadProps) {
  return (
    <header className="mb-4 flex flex-wrap items-end justify-between gap-x-6 gap-y-2">
      <title>{`${documentTitle ?? title} · Trammel`}</title>
      <div className="min-w-0">
        <h1 className="break-words">{title}</h1>
        {lead && <p className="mt-0.5 max-w-prose text-pencil">{lead}</p>}
      </div>
      {actions && <div className="no-print flex flex-wrap gap-2">{actions}</div>}
    </header>
  );
}

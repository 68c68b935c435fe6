import type { ReactNode } from 'react';

export interface EmptyStateProps {
  title: ReactNode;
  /** What comes next and who does it. */
  children: ReactNode;
  actions?: ReactNode;
}

export function EmptyState({ title, children, actions }: EmptyStateProps) {
  return (
    <div className="flex flex-col items-start gap-2 border border-dashed border-pencil px-5 py-6">
      <p className="font-semibold">{title}</p>
      <div className="max-w-prose text-pencil">{children}</div>
      {actions && <div className="mt-1 flex flex-wrap gap-2">{actions}</div>}
    </div>
  );
}

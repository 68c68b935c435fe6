import type { ReactNode } from 'react';
import { cn } from '../../lib/cn.ts';

export type NoticeTone = 'information' | 'attention' | 'failure' | 'success';

const looks: Record<NoticeTone, string> = {
  information: 'border-marking bg-marking/6',
  attention: 'border-brass bg-brass/8',
  failure: 'border-vermilion bg-vermilion/6',
  success: 'border-verdigris bg-verdigris/6',
};

export interface NoticeProps {
  tone?: NoticeTone;
  title?: ReactNode;
  children?: ReactNode;
  /** The next step, as buttons or links. */
  actions?: ReactNode;
  /** Announced when it appears; for what arrives after the page. */
  live?: boolean;
}

export function Notice({ tone = 'information', title, children, actions, live }: NoticeProps) {
  const role = live ? (tone === 'failure' ? 'alert' : 'status') : undefined;
  return (
    <div role={role} className={cn('flex flex-col gap-2 border border-l-4 px-4 py-3', looks[tone])}>
      {title && <p className="font-semibold">{title}</p>}
      {children && <div className="max-w-prose">{children}</div>}
      {actions && <div className="flex flex-wrap gap-2">{actions}</div>}
    </div>
  );
}

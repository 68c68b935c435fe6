import type { ReactNode } from 'react';
import { cn } from '../../lib/cn.ts';

export interface TitleBlockProps {
  partNumber: string;
  revision: string;
  description: string;
  material?: string | undefined;
  customer?: string | undefined;
  supplier?: string | undefined;
  site?: string | undefined;
  /** `metric` or `inch`, in words. */
  units?: string | undefined;
  due?: ReactNode;
  level?: number | undefined;
  /** Number of the request. */
  request?: number | undefined;
  /** State of the package or revision, as a badge. */
  state?: ReactNode;
  /** Heading level of the part number: the head of a page is its h1. */
  isPageHead?: boolean;
}

/** Set like the title block of a drawing: the same cells in the same places, empty ones included. */
export function TitleBlock(props: TitleBlockProps) {
  const Number = props.isPageHead ? 'h1' : 'p';
  return (
    <div className="keep-whole border border-graphite bg-sheet">
      <dl className="grid grid-cols-2 gap-px bg-rule sm:grid-cols-4 lg:grid-cols-8">
        <Cell caption="Part number" className="lg:col-span-2">
          <Number className="figures text-[1.125rem] leading-6 font-semibold break-words">
            {props.partNumber}
          </Number>
        </Cell>
        <Cell caption="Revision" mono>
          {props.revision}
        </Cell>
        <Cell caption="Description" className="col-span-2 sm:col-span-1 lg:col-span-3">
          {props.description}
        </Cell>
        <Cell caption="Request" mono>
          {props.request}
        </Cell>
        <Cell caption="State">{props.state}</Cell>
        <Cell caption="Supplier" className="lg:col-span-2">
          {props.supplier}
        </Cell>
        <Cell caption="Site">{props.site}</Cell>
        <Cell caption="Customer">{props.customer}</Cell>
        <Cell caption="Material">{props.material}</Cell>
        <Cell caption="Units">{props.units}</Cell>
        <Cell caption="Level" mono>
          {props.level}
        </Cell>
        <Cell caption="Due" className="max-sm:col-span-2">
          {props.due}
        </Cell>
      </dl>
    </div>
  );
}

function Cell({
  caption,
  className,
  mono,
  children,
}: {
  caption: string;
  className?: string;
  mono?: boolean;
  children: ReactNode;
}) {
  const empty = children === undefined || children === null || children === '';
  return (
    <div className={cn('min-w-0 bg-sheet px-2 pt-0.5 pb-1', className)}>
      <dt className="caption">{caption}</dt>
      <dd className={cn('min-h-5 break-words', mono && 'figures')}>
        {empty ? <span className="text-pencil">—</span> : children}
      </dd>
    </div>
  );
}
